import { index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { groups, users } from './accounts.ts';
import { expansions } from './expansions.ts';

export const shelves = sqliteTable(
  'shelves',
  {
    id: text('id').primaryKey(),
    groupId: text('group_id')
      .notNull()
      .references(() => groups.id, { onDelete: 'cascade' }),
    title: text('title').notNull(),
    description: text('description').notNull(),
    createdAt: text('created_at').notNull(),
    deletedAt: text('deleted_at'),
  },
  (table) => [index('shelves_group').on(table.groupId)],
);

/** target names a model, an expansion or a diagram ("<expansion>/<label>"). */
export const shelfItems = sqliteTable(
  'shelf_items',
  {
    id: text('id').primaryKey(),
    shelfId: text('shelf_id')
      .notNull()
      .references(() => shelves.id, { onDelete: 'cascade' }),
    kind: text('kind', { enum: ['model', 'expansion', 'diagram'] }).notNull(),
    target: text('target').notNull(),
    place: integer('place').notNull(),
    note: text('note').notNull(),
    addedBy: text('added_by').references(() => users.id, { onDelete: 'set null' }),
    createdAt: text('created_at').notNull(),
  },
  (table) => [uniqueIndex('shelf_items_once').on(table.shelfId, table.kind, table.target)],
);

export const comments = sqliteTable(
  'comments',
  {
    id: text('id').primaryKey(),
    expansionId: text('expansion_id')
      .notNull()
      .references(() => expansions.id, { onDelete: 'cascade' }),
    /** Bare label of a diagram, or null for the expansion as a whole. */
    label: text('label'),
    authorId: text('author_id').references(() => users.id, { onDelete: 'set null' }),
    text: text('text').notNull(),
    createdAt: text('created_at').notNull(),
    deletedAt: text('deleted_at'),
  },
  (table) => [index('comments_expansion').on(table.expansionId, table.createdAt)],
);

/** A second person's signature under a result, bound to its exact content. */
export const countersignatures = sqliteTable(
  'countersignatures',
  {
    id: text('id').primaryKey(),
    expansionId: text('expansion_id')
      .notNull()
      .references(() => expansions.id, { onDelete: 'cascade' }),
    contentHash: text('content_hash').notNull(),
    userId: text('user_id').references(() => users.id, { onDelete: 'set null' }),
    method: text('method').notNull(),
    createdAt: text('created_at').notNull(),
  },
  (table) => [uniqueIndex('countersignatures_once').on(table.expansionId, table.userId, table.contentHash)],
);

/** A list or diagram made elsewhere and what the desk found about it. */
export const checks = sqliteTable(
  'checks',
  {
    id: text('id').primaryKey(),
    groupId: text('group_id')
      .notNull()
      .references(() => groups.id, { onDelete: 'cascade' }),
    expansionId: text('expansion_id').references(() => expansions.id, { onDelete: 'set null' }),
    createdBy: text('created_by').references(() => users.id, { onDelete: 'set null' }),
    input: text('input').notNull(),
    report: text('report').notNull(),
    createdAt: text('created_at').notNull(),
  },
  (table) => [index('checks_group').on(table.groupId, table.createdAt)],
);

export const uploads = sqliteTable(
  'uploads',
  {
    id: text('id').primaryKey(),
    groupId: text('group_id')
      .notNull()
      .references(() => groups.id, { onDelete: 'cascade' }),
    checkId: text('check_id').references(() => checks.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    bytes: integer('bytes').notNull(),
    sha256: text('sha256').notNull(),
    content: text('content').notNull(),
    createdAt: text('created_at').notNull(),
  },
  (table) => [index('uploads_group').on(table.groupId)],
);
