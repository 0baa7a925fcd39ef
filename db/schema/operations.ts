import { index, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';

/** Append-only: triggers refuse UPDATE and DELETE (see the migrations). Says who did what, never a secret. */
export const auditEvents = sqliteTable(
  'audit_events',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    at: text('at').notNull(),
    /** User id, "visitor" or "system". */
    actor: text('actor').notNull(),
    action: text('action').notNull(),
    object: text('object').notNull(),
    address: text('address').notNull(),
    requestId: text('request_id').notNull(),
    detail: text('detail').notNull(),
  },
  (table) => [index('audit_events_at').on(table.at)],
);

/** Mail to be sent; delivery marks it. */
export const outbox = sqliteTable(
  'outbox',
  {
    id: text('id').primaryKey(),
    to: text('to_address').notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
    createdAt: text('created_at').notNull(),
    sentAt: text('sent_at'),
    attempts: integer('attempts').notNull().default(0),
  },
  (table) => [index('outbox_sent').on(table.sentAt, table.createdAt)],
);
