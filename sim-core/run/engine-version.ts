/** Changes whenever the same specification may come to another digest. */
export const engineVersion = '1.0.0';
