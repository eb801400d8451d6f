import { EntitySchema } from 'typeorm';
import { OptionEntity } from './option.ts';

/** Who saved an option, when, and what it said then. */
export interface OptionRevisionRow {
  optionId: string;
  revision: number;
  name: string;
  note: string;
  /** number of works */
  works: number;
  /** of the drawing in `option_drawing`; that one may be gone when the history grew too long */
  drawingHash: string;
  /** what changed, in words */
  summary: string;
  changedAt: string;
  changedBy: string;
}

export const OptionRevisionEntity = new EntitySchema<OptionRevisionRow>({
  name: 'OptionRevision',
  tableName: 'option_revision',
  columns: {
    optionId: { type: 'text', primary: true },
    revision: { type: 'integer', primary: true },
    name: { type: 'text' },
    note: { type: 'text' },
    works: { type: 'integer' },
    drawingHash: { type: 'text' },
    summary: { type: 'text' },
    changedAt: { type: 'text' },
    changedBy: { type: 'text' },
  },
  foreignKeys: [
    {
      name: 'option_revision_option',
      target: OptionEntity,
      columnNames: ['optionId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});

/** The works and sets of one or several revisions of an option: deflated JSON, under the SHA-256 of the JSON. */
export interface OptionDrawingRow {
  optionId: string;
  hash: string;
  body: Buffer;
}

export const OptionDrawingEntity = new EntitySchema<OptionDrawingRow>({
  name: 'OptionDrawing',
  tableName: 'option_drawing',
  columns: {
    optionId: { type: 'text', primary: true },
    hash: { type: 'text', primary: true },
    body: { type: 'blob' },
  },
  foreignKeys: [
    {
      name: 'option_drawing_option',
      target: OptionEntity,
      columnNames: ['optionId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
