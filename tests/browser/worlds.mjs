/** Each worker of the browser tests has a demo world of its own: what one test changes is not in the way of another. */
export const WORLDS = 2;

/**
 * Where the app of a world, its object store and its mail room listen, beside a running demo, and where its data lies.
 * @param {number} index
 */
export const worldOf = (index) => ({
  appUrl: `http://127.0.0.1:${3100 + index}`,
  storeUrl: `http://127.0.0.1:${4668 + 10 * index}`,
  mailUrl: `http://127.0.0.1:${4669 + 10 * index}`,
  dataDir: `.data/browser-${index}`,
});

/** @typedef {ReturnType<typeof worldOf>} World */
