import { EntitySchema } from 'typeorm';
import { ComparisonEntity } from './comparison.ts';
import { SiteEntity } from './site.ts';

/** What is handed over of a comparison. Its content stands in its versions, which never change. */
export interface BriefRow {
  id: string;
  siteId: string;
  /** null once the comparison is gone: the versions hold all that they print */
  comparisonId: string | null;
  /** the newest version */
  version: number;
  createdAt: string;
}
export const BriefEntity = new EntitySchema<BriefRow>({
  name: 'Brief',
  tableName: 'brief',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    comparisonId: { type: 'text', nullable: true },
    version: { type: 'integer' },
    createdAt: { type: 'text' },
  },
  indices: [
    { name: 'brief_by_site', columns: ['siteId'] },
    { name: 'brief_by_comparison', columns: ['comparisonId'] },
  ],
  foreignKeys: [
    {
      name: 'brief_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
    {
      name: 'brief_comparison',
      target: ComparisonEntity,
      columnNames: ['comparisonId'],
      referencedColumnNames: ['id'],
      onDelete: 'SET NULL',
    },
  ],
});

const ofBrief = (name: string) => ({
  name,
  target: BriefEntity,
  columnNames: ['briefId'],
  referencedColumnNames: ['id'],
  onDelete: 'CASCADE' as const,
});

/** A version: the words and the frozen figures (JSON of the contract's schemas), and the PDF that was made of them. */
export interface BriefVersionRow {
  briefId: string;
  version: number;
  text: string;
  facts: string;
  pdfHash: string;
  bytes: number;
  pages: number;
  briefPages: number;
  at: string;
  by: string;
}
export const BriefVersionEntity = new EntitySchema<BriefVersionRow>({
  name: 'BriefVersion',
  tableName: 'brief_version',
  columns: {
    briefId: { type: 'text', primary: true },
    version: { type: 'integer', primary: true },
    text: { type: 'text' },
    facts: { type: 'text' },
    pdfHash: { type: 'text' },
    bytes: { type: 'integer' },
    pages: { type: 'integer' },
    briefPages: { type: 'integer' },
    at: { type: 'text' },
    by: { type: 'text' },
  },
  indices: [{ name: 'brief_version_by_hash', columns: ['pdfHash'] }],
  foreignKeys: [ofBrief('brief_version_brief')],
});

/** A map as a version prints it, a PNG. */
export interface BriefMapRow {
  briefId: string;
  version: number;
  /** place among the options */
  option: number;
  hash: string;
}
export const BriefMapEntity = new EntitySchema<BriefMapRow>({
  name: 'BriefMap',
  tableName: 'brief_map',
  columns: {
    briefId: { type: 'text', primary: true },
    version: { type: 'integer', primary: true },
    option: { type: 'integer', primary: true },
    hash: { type: 'text' },
  },
  indices: [{ name: 'brief_map_by_hash', columns: ['hash'] }],
  foreignKeys: [ofBrief('brief_map_brief')],
});

/** An e-mail with a version of a brief. `recipients` is JSON of the contract's schema. */
export interface BriefMessageRow {
  id: string;
  briefId: string;
  /** made by the sender: one message a key */
  key: string;
  version: number;
  subject: string;
  text: string;
  attached: boolean;
  recipients: string;
  sentAt: string;
  sentBy: string;
}
export const BriefMessageEntity = new EntitySchema<BriefMessageRow>({
  name: 'BriefMessage',
  tableName: 'brief_message',
  columns: {
    id: { type: 'text', primary: true },
    briefId: { type: 'text' },
    key: { type: 'text' },
    version: { type: 'integer' },
    subject: { type: 'text' },
    text: { type: 'text' },
    attached: { type: 'boolean' },
    recipients: { type: 'text' },
    sentAt: { type: 'text' },
    sentBy: { type: 'text' },
  },
  indices: [{ name: 'brief_message_by_key', columns: ['briefId', 'key'], unique: true }],
  foreignKeys: [ofBrief('brief_message_brief')],
});
