CREATE TABLE `api_tokens` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`name` text NOT NULL,
	`token_hash` text NOT NULL,
	`scope` text NOT NULL,
	`created_at` text NOT NULL,
	`expires_at` text NOT NULL,
	`last_used_at` text,
	`revoked_at` text,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
) STRICT;
--> statement-breakpoint
CREATE UNIQUE INDEX `api_tokens_hash` ON `api_tokens` (`token_hash`);--> statement-breakpoint
CREATE INDEX `api_tokens_user` ON `api_tokens` (`user_id`);--> statement-breakpoint
CREATE TABLE `groups` (
	`id` text PRIMARY KEY NOT NULL,
	`slug` text NOT NULL,
	`name` text NOT NULL,
	`personal_of` text,
	`created_at` text NOT NULL,
	FOREIGN KEY (`personal_of`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
) STRICT;
--> statement-breakpoint
CREATE UNIQUE INDEX `groups_slug` ON `groups` (`slug`);--> statement-breakpoint
CREATE UNIQUE INDEX `groups_personal` ON `groups` (`personal_of`);--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` text PRIMARY KEY NOT NULL,
	`group_id` text NOT NULL,
	`email` text NOT NULL,
	`role` text NOT NULL,
	`token_hash` text NOT NULL,
	`invited_by` text,
	`created_at` text NOT NULL,
	`expires_at` text NOT NULL,
	`used_at` text,
	`revoked_at` text,
	FOREIGN KEY (`group_id`) REFERENCES `groups`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`invited_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
) STRICT;
--> statement-breakpoint
CREATE UNIQUE INDEX `invitations_token` ON `invitations` (`token_hash`);--> statement-breakpoint
CREATE INDEX `invitations_group` ON `invitations` (`group_id`);--> statement-breakpoint
CREATE TABLE `memberships` (
	`group_id` text NOT NULL,
	`user_id` text NOT NULL,
	`role` text NOT NULL,
	`created_at` text NOT NULL,
	PRIMARY KEY(`group_id`, `user_id`),
	FOREIGN KEY (`group_id`) REFERENCES `groups`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
) STRICT;
--> statement-breakpoint
CREATE INDEX `memberships_user` ON `memberships` (`user_id`);--> statement-breakpoint
CREATE TABLE `password_resets` (
	`token_hash` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`created_at` text NOT NULL,
	`expires_at` text NOT NULL,
	`used_at` text,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
) STRICT;
--> statement-breakpoint
CREATE INDEX `password_resets_user` ON `password_resets` (`user_id`);--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`expires_at` integer NOT NULL,
	`public_id` text NOT NULL,
	`created_at` text NOT NULL,
	`last_seen_at` text NOT NULL,
	`address` text NOT NULL,
	`agent` text NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
) STRICT;
--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `sessions_public` ON `sessions` (`public_id`);--> statement-breakpoint
CREATE TABLE `users` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`password_hash` text NOT NULL,
	`demo` integer DEFAULT false NOT NULL,
	`created_at` text NOT NULL,
	`password_changed_at` text NOT NULL
) STRICT;
--> statement-breakpoint
CREATE UNIQUE INDEX `users_email` ON `users` (`email`);--> statement-breakpoint
CREATE TABLE `bodies` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`content_hash` text NOT NULL,
	`engine_version` text NOT NULL,
	`state` text NOT NULL,
	`classes` integer DEFAULT 0 NOT NULL,
	`summary` text,
	`ledger` text,
	`milliseconds` integer,
	`created_at` text NOT NULL,
	`finished_at` text
) STRICT;
--> statement-breakpoint
CREATE UNIQUE INDEX `bodies_content` ON `bodies` (`content_hash`,`engine_version`);--> statement-breakpoint
CREATE TABLE `diagrams` (
	`body_id` integer NOT NULL,
	`position` integer NOT NULL,
	`label` text NOT NULL,
	`body` text NOT NULL,
	`loops` integer NOT NULL,
	`symmetry_factor` text NOT NULL,
	`weight` text NOT NULL,
	`pairings` text NOT NULL,
	`order_key` text NOT NULL,
	`shape` text NOT NULL,
	`flags` integer NOT NULL,
	`picture` text,
	PRIMARY KEY(`body_id`, `position`),
	FOREIGN KEY (`body_id`) REFERENCES `bodies`(`id`) ON UPDATE no action ON DELETE cascade
) WITHOUT ROWID, STRICT;
--> statement-breakpoint
CREATE INDEX `diagrams_label` ON `diagrams` (`body_id`,`label`);--> statement-breakpoint
CREATE INDEX `diagrams_loops` ON `diagrams` (`body_id`,`loops`,`position`);--> statement-breakpoint
CREATE INDEX `diagrams_factor` ON `diagrams` (`body_id`,length("symmetry_factor"),`symmetry_factor`,`position`);--> statement-breakpoint
CREATE INDEX `diagrams_shape` ON `diagrams` (`body_id`,`shape`,`position`);--> statement-breakpoint
CREATE INDEX `diagrams_order` ON `diagrams` (`body_id`,`order_key`,`position`);--> statement-breakpoint
CREATE TABLE `expansions` (
	`id` text PRIMARY KEY NOT NULL,
	`group_id` text,
	`visitor` text,
	`created_by` text,
	`visibility` text DEFAULT 'private' NOT NULL,
	`model_id` text,
	`title` text NOT NULL,
	`request` text NOT NULL,
	`request_hash` text NOT NULL,
	`content_hash` text NOT NULL,
	`engine_version` text NOT NULL,
	`body_id` integer,
	`state` text NOT NULL,
	`reused_from` text,
	`error` text,
	`created_at` text NOT NULL,
	`finished_at` text,
	`expires_at` text,
	`deleted_at` text,
	FOREIGN KEY (`group_id`) REFERENCES `groups`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null,
	FOREIGN KEY (`model_id`) REFERENCES `models`(`id`) ON UPDATE no action ON DELETE set null,
	FOREIGN KEY (`body_id`) REFERENCES `bodies`(`id`) ON UPDATE no action ON DELETE set null
) STRICT;
--> statement-breakpoint
CREATE INDEX `expansions_group` ON `expansions` (`group_id`,`created_at`,`id`);--> statement-breakpoint
CREATE INDEX `expansions_visitor` ON `expansions` (`visitor`,`created_at`,`id`);--> statement-breakpoint
CREATE INDEX `expansions_content` ON `expansions` (`content_hash`,`engine_version`);--> statement-breakpoint
CREATE INDEX `expansions_body` ON `expansions` (`body_id`);--> statement-breakpoint
CREATE INDEX `expansions_expiry` ON `expansions` (`expires_at`);--> statement-breakpoint
CREATE TABLE `jobs` (
	`id` text PRIMARY KEY NOT NULL,
	`body_id` integer NOT NULL,
	`expansion_id` text NOT NULL,
	`owner` text NOT NULL,
	`state` text NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`seconds` integer NOT NULL,
	`classes` integer NOT NULL,
	`estimated` integer,
	`created_at` text NOT NULL,
	`started_at` text,
	`finished_at` text,
	FOREIGN KEY (`body_id`) REFERENCES `bodies`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`expansion_id`) REFERENCES `expansions`(`id`) ON UPDATE no action ON DELETE cascade
) STRICT;
--> statement-breakpoint
CREATE INDEX `jobs_state` ON `jobs` (`state`,`created_at`);--> statement-breakpoint
CREATE INDEX `jobs_body` ON `jobs` (`body_id`);--> statement-breakpoint
CREATE TABLE `checks` (
	`id` text PRIMARY KEY NOT NULL,
	`group_id` text NOT NULL,
	`expansion_id` text,
	`created_by` text,
	`input` text NOT NULL,
	`report` text NOT NULL,
	`created_at` text NOT NULL,
	FOREIGN KEY (`group_id`) REFERENCES `groups`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`expansion_id`) REFERENCES `expansions`(`id`) ON UPDATE no action ON DELETE set null,
	FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
) STRICT;
--> statement-breakpoint
CREATE INDEX `checks_group` ON `checks` (`group_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `comments` (
	`id` text PRIMARY KEY NOT NULL,
	`expansion_id` text NOT NULL,
	`label` text,
	`author_id` text,
	`text` text NOT NULL,
	`created_at` text NOT NULL,
	`deleted_at` text,
	FOREIGN KEY (`expansion_id`) REFERENCES `expansions`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
) STRICT;
--> statement-breakpoint
CREATE INDEX `comments_expansion` ON `comments` (`expansion_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `countersignatures` (
	`id` text PRIMARY KEY NOT NULL,
	`expansion_id` text NOT NULL,
	`content_hash` text NOT NULL,
	`user_id` text,
	`method` text NOT NULL,
	`created_at` text NOT NULL,
	FOREIGN KEY (`expansion_id`) REFERENCES `expansions`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
) STRICT;
--> statement-breakpoint
CREATE UNIQUE INDEX `countersignatures_once` ON `countersignatures` (`expansion_id`,`user_id`,`content_hash`);--> statement-breakpoint
CREATE TABLE `shelf_items` (
	`id` text PRIMARY KEY NOT NULL,
	`shelf_id` text NOT NULL,
	`kind` text NOT NULL,
	`target` text NOT NULL,
	`place` integer NOT NULL,
	`note` text NOT NULL,
	`added_by` text,
	`created_at` text NOT NULL,
	FOREIGN KEY (`shelf_id`) REFERENCES `shelves`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`added_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
) STRICT;
--> statement-breakpoint
CREATE UNIQUE INDEX `shelf_items_once` ON `shelf_items` (`shelf_id`,`kind`,`target`);--> statement-breakpoint
CREATE TABLE `shelves` (
	`id` text PRIMARY KEY NOT NULL,
	`group_id` text NOT NULL,
	`title` text NOT NULL,
	`description` text NOT NULL,
	`created_at` text NOT NULL,
	`deleted_at` text,
	FOREIGN KEY (`group_id`) REFERENCES `groups`(`id`) ON UPDATE no action ON DELETE cascade
) STRICT;
--> statement-breakpoint
CREATE INDEX `shelves_group` ON `shelves` (`group_id`);--> statement-breakpoint
CREATE TABLE `uploads` (
	`id` text PRIMARY KEY NOT NULL,
	`group_id` text NOT NULL,
	`check_id` text,
	`name` text NOT NULL,
	`bytes` integer NOT NULL,
	`sha256` text NOT NULL,
	`content` text NOT NULL,
	`created_at` text NOT NULL,
	FOREIGN KEY (`group_id`) REFERENCES `groups`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`check_id`) REFERENCES `checks`(`id`) ON UPDATE no action ON DELETE cascade
) STRICT;
--> statement-breakpoint
CREATE INDEX `uploads_group` ON `uploads` (`group_id`);--> statement-breakpoint
CREATE TABLE `models` (
	`id` text PRIMARY KEY NOT NULL,
	`group_id` text NOT NULL,
	`created_by` text,
	`visibility` text DEFAULT 'private' NOT NULL,
	`parent_id` text,
	`title` text NOT NULL,
	`description` text NOT NULL,
	`revision` integer NOT NULL,
	`created_at` text NOT NULL,
	`updated_at` text NOT NULL,
	`deleted_at` text,
	FOREIGN KEY (`group_id`) REFERENCES `groups`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
) STRICT;
--> statement-breakpoint
CREATE INDEX `models_group` ON `models` (`group_id`,`updated_at`,`id`);--> statement-breakpoint
CREATE TABLE `revisions` (
	`id` text PRIMARY KEY NOT NULL,
	`model_id` text NOT NULL,
	`number` integer NOT NULL,
	`input` text NOT NULL,
	`content_hash` text NOT NULL,
	`created_by` text,
	`created_at` text NOT NULL,
	FOREIGN KEY (`model_id`) REFERENCES `models`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE set null
) STRICT;
--> statement-breakpoint
CREATE UNIQUE INDEX `revisions_number` ON `revisions` (`model_id`,`number`);--> statement-breakpoint
CREATE TABLE `audit_events` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`at` text NOT NULL,
	`actor` text NOT NULL,
	`action` text NOT NULL,
	`object` text NOT NULL,
	`address` text NOT NULL,
	`request_id` text NOT NULL,
	`detail` text NOT NULL
) STRICT;
--> statement-breakpoint
CREATE INDEX `audit_events_at` ON `audit_events` (`at`);--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` text PRIMARY KEY NOT NULL,
	`to_address` text NOT NULL,
	`subject` text NOT NULL,
	`text` text NOT NULL,
	`created_at` text NOT NULL,
	`sent_at` text,
	`attempts` integer DEFAULT 0 NOT NULL
) STRICT;
--> statement-breakpoint
CREATE INDEX `outbox_sent` ON `outbox` (`sent_at`,`created_at`);--> statement-breakpoint
CREATE TRIGGER `audit_events_fixed` BEFORE UPDATE ON `audit_events` BEGIN SELECT RAISE(ABORT, 'audit events are append-only'); END;
--> statement-breakpoint
CREATE TRIGGER `audit_events_kept` BEFORE DELETE ON `audit_events` BEGIN SELECT RAISE(ABORT, 'audit events are append-only'); END;
