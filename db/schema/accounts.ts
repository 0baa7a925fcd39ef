import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';

/** Instants are ISO 8601 in UTC; public ids are random and unguessable. */
export const users = sqliteTable(
  'users',
  {
    id: text('id').primaryKey(),
    /** Lower case, trimmed: the account's key. */
    email: text('email').notNull(),
    name: text('name').notNull(),
    passwordHash: text('password_hash').notNull(),
    demo: integer('demo', { mode: 'boolean' }).notNull().default(false),
    createdAt: text('created_at').notNull(),
    passwordChangedAt: text('password_changed_at').notNull(),
  },
  (table) => [uniqueIndex('users_email').on(table.email)],
);

/** id is the SHA-256 of the cookie's value: a stolen copy of the database opens no session. */
export const sessions = sqliteTable(
  'sessions',
  {
    id: text('id').primaryKey(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    /** Seconds since 1970, as the session library keeps it. */
    expiresAt: integer('expires_at').notNull(),
    /** What the list of sessions shows and ends: says nothing about the cookie. */
    publicId: text('public_id').notNull(),
    createdAt: text('created_at').notNull(),
    lastSeenAt: text('last_seen_at').notNull(),
    address: text('address').notNull(),
    agent: text('agent').notNull(),
  },
  (table) => [index('sessions_user').on(table.userId), uniqueIndex('sessions_public').on(table.publicId)],
);

/** A team; everyone has a personal one, made at sign-up. */
export const groups = sqliteTable(
  'groups',
  {
    id: text('id').primaryKey(),
    slug: text('slug').notNull(),
    name: text('name').notNull(),
    /** The owner of a personal workspace; null for a team. */
    personalOf: text('personal_of').references(() => users.id, { onDelete: 'cascade' }),
    createdAt: text('created_at').notNull(),
  },
  (table) => [uniqueIndex('groups_slug').on(table.slug), uniqueIndex('groups_personal').on(table.personalOf)],
);

export const memberships = sqliteTable(
  'memberships',
  {
    groupId: text('group_id')
      .notNull()
      .references(() => groups.id, { onDelete: 'cascade' }),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    role: text('role', { enum: ['reader', 'checker', 'author', 'lead'] }).notNull(),
    createdAt: text('created_at').notNull(),
  },
  (table) => [primaryKey({ columns: [table.groupId, table.userId] }), index('memberships_user').on(table.userId)],
);

export const invitations = sqliteTable(
  'invitations',
  {
    id: text('id').primaryKey(),
    groupId: text('group_id')
      .notNull()
      .references(() => groups.id, { onDelete: 'cascade' }),
    email: text('email').notNull(),
    role: text('role', { enum: ['reader', 'checker', 'author', 'lead'] }).notNull(),
    tokenHash: text('token_hash').notNull(),
    invitedBy: text('invited_by').references(() => users.id, { onDelete: 'set null' }),
    createdAt: text('created_at').notNull(),
    expiresAt: text('expires_at').notNull(),
    usedAt: text('used_at'),
    revokedAt: text('revoked_at'),
  },
  (table) => [uniqueIndex('invitations_token').on(table.tokenHash), index('invitations_group').on(table.groupId)],
);

export const apiTokens = sqliteTable(
  'api_tokens',
  {
    id: text('id').primaryKey(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    tokenHash: text('token_hash').notNull(),
    scope: text('scope', { enum: ['read', 'write'] }).notNull(),
    createdAt: text('created_at').notNull(),
    expiresAt: text('expires_at').notNull(),
    lastUsedAt: text('last_used_at'),
    revokedAt: text('revoked_at'),
  },
  (table) => [uniqueIndex('api_tokens_hash').on(table.tokenHash), index('api_tokens_user').on(table.userId)],
);

export const passwordResets = sqliteTable(
  'password_resets',
  {
    tokenHash: text('token_hash').primaryKey(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    createdAt: text('created_at').notNull(),
    expiresAt: text('expires_at').notNull(),
    usedAt: text('used_at'),
  },
  (table) => [index('password_resets_user').on(table.userId)],
);
