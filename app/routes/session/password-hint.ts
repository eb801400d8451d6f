/** What is asked of a password, said before it is typed. */
export const passwordHint =
  'At least 10 characters. A few words in a row are easy to keep and hard to guess.';
