import { expose } from 'comlink';
import { figuresBook } from './figures-book.ts';

/** Bootstraps take long where there are many futures, so they are drawn here. */
expose(figuresBook());
