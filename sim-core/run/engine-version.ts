/** Changes whenever the same specification may come to another digest. */
export const engineVersion = '2.1.0';
