import { index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { groups, users } from './accounts.ts';

/** A Lagrangian with its conventions; what it says stands in its revisions. */
export const models = sqliteTable(
  'models',
  {
    id: text('id').primaryKey(),
    groupId: text('group_id')
      .notNull()
      .references(() => groups.id, { onDelete: 'cascade' }),
    createdBy: text('created_by').references(() => users.id, { onDelete: 'set null' }),
    /** private: the group's members; public: everyone who has the link, and the demo list. */
    visibility: text('visibility', { enum: ['private', 'public'] })
      .notNull()
      .default('private'),
    parentId: text('parent_id'),
    title: text('title').notNull(),
    description: text('description').notNull(),
    /** Number of the newest revision. */
    revision: integer('revision').notNull(),
    createdAt: text('created_at').notNull(),
    updatedAt: text('updated_at').notNull(),
    deletedAt: text('deleted_at'),
  },
  (table) => [index('models_group').on(table.groupId, table.updatedAt, table.id)],
);

export const revisions = sqliteTable(
  'revisions',
  {
    id: text('id').primaryKey(),
    modelId: text('model_id')
      .notNull()
      .references(() => models.id, { onDelete: 'cascade' }),
    number: integer('number').notNull(),
    /** The model's input as contract JSON. */
    input: text('input').notNull(),
    contentHash: text('content_hash').notNull(),
    createdBy: text('created_by').references(() => users.id, { onDelete: 'set null' }),
    createdAt: text('created_at').notNull(),
  },
  (table) => [uniqueIndex('revisions_number').on(table.modelId, table.number)],
);
