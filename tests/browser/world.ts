/** Where the app of the browser tests, its object store and its mail room listen; beside a running demo. */
export const world = {
  appUrl: 'http://127.0.0.1:3100',
  storeUrl: 'http://127.0.0.1:4668',
  mailUrl: 'http://127.0.0.1:4669',
  dataDir: '.data/browser',
};
