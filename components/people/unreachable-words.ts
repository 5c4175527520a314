/** Why no mail goes to somebody, and what to do about it, for those who look after them. */
export const unreachableWords = {
  bounced: 'Mail comes back from this address, so none goes out. Call them, and ask for another one.',
  complained: 'Our mail was called unwanted there, so none goes out. Call them, and ask how to reach them.',
};
