/** Changes whenever the same specification may come to another digest. */
export const engineVersion = '2.0.0';
