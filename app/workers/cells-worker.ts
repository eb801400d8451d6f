import { expose } from 'comlink';
import { cellsFace } from './cells-face.ts';

expose(cellsFace);
