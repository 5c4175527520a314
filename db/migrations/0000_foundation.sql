CREATE TABLE `audit_events` (
	`seq` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`at` integer NOT NULL,
	`actor_id` text,
	`action` text NOT NULL,
	`build_id` text,
	`subject_id` text,
	`outcome` text NOT NULL,
	`reason` text,
	`previous_hash` text NOT NULL,
	`hash` text NOT NULL
);
--> statement-breakpoint
CREATE INDEX `audit_events_build` ON `audit_events` (`build_id`,`seq`);--> statement-breakpoint
CREATE INDEX `audit_events_actor` ON `audit_events` (`actor_id`,`seq`);--> statement-breakpoint
CREATE TABLE `assignments` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`user_id` text NOT NULL,
	`cleared` integer DEFAULT false NOT NULL,
	`step_in_reason` text,
	`assigned_by_id` text,
	`started_at` integer NOT NULL,
	`ended_at` integer,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`assigned_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `assignments_live_unique` ON `assignments` (`build_id`,`user_id`) WHERE "assignments"."ended_at" is null;--> statement-breakpoint
CREATE INDEX `assignments_user` ON `assignments` (`user_id`,`ended_at`);--> statement-breakpoint
CREATE TABLE `build_people` (
	`build_id` text NOT NULL,
	`user_id` text NOT NULL,
	`standing` text NOT NULL,
	`created_at` integer NOT NULL,
	PRIMARY KEY(`build_id`, `user_id`),
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "build_people_standing_known" CHECK("build_people"."standing" in ('owner', 'companion'))
);
--> statement-breakpoint
CREATE INDEX `build_people_user` ON `build_people` (`user_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `build_people_owner_unique` ON `build_people` (`build_id`) WHERE "build_people"."standing" = 'owner';--> statement-breakpoint
CREATE TABLE `standing_assignments` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`route_id` text,
	`stage_key` text,
	`assigned_by_id` text,
	`started_at` integer NOT NULL,
	`ended_at` integer,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`route_id`) REFERENCES `routes`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`assigned_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `standing_assignments_user` ON `standing_assignments` (`user_id`,`ended_at`);--> statement-breakpoint
CREATE TABLE `build_stages` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`position` integer NOT NULL,
	`key` text NOT NULL,
	`name` text NOT NULL,
	`department` text NOT NULL,
	`usual_days` integer NOT NULL,
	`started_at` integer,
	`finished_at` integer,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`department`) REFERENCES `departments`(`key`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `build_stages_position_unique` ON `build_stages` (`build_id`,`position`);--> statement-breakpoint
CREATE TABLE `builds` (
	`id` text PRIMARY KEY NOT NULL,
	`order_number` text NOT NULL,
	`instrument` text NOT NULL,
	`finish_name` text NOT NULL,
	`finish_hex` text NOT NULL,
	`scale_length_in` real NOT NULL,
	`rack` text,
	`route_id` text NOT NULL,
	`release_needed` integer DEFAULT false NOT NULL,
	`held_until_at` integer,
	`ordered_at` integer NOT NULL,
	`delivered_at` integer,
	`diary_revision` integer DEFAULT 0 NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`route_id`) REFERENCES `routes`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `builds_order_number_unique` ON `builds` (`order_number`);--> statement-breakpoint
CREATE INDEX `builds_delivered` ON `builds` (`delivered_at`,`order_number`);--> statement-breakpoint
CREATE INDEX `builds_route` ON `builds` (`route_id`);--> statement-breakpoint
CREATE TABLE `diary_events` (
	`seq` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`build_id` text NOT NULL,
	`entry_id` text NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`entry_id`) REFERENCES `entries`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `diary_events_build` ON `diary_events` (`build_id`,`seq`);--> statement-breakpoint
CREATE TABLE `diary_visits` (
	`build_id` text NOT NULL,
	`user_id` text NOT NULL,
	`visited_at` integer NOT NULL,
	`visit_before_at` integer,
	PRIMARY KEY(`build_id`, `user_id`),
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `entries` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`stage_id` text NOT NULL,
	`author_id` text NOT NULL,
	`body` text NOT NULL,
	`body_text` text NOT NULL,
	`audience` text NOT NULL,
	`state` text NOT NULL,
	`dated_at` integer NOT NULL,
	`revision` integer DEFAULT 1 NOT NULL,
	`edited_at` integer,
	`idempotency_key` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`stage_id`) REFERENCES `build_stages`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "entries_audience_known" CHECK("entries"."audience" in ('buyer', 'shop')),
	CONSTRAINT "entries_state_known" CHECK("entries"."state" in ('held', 'published', 'withdrawn'))
);
--> statement-breakpoint
CREATE INDEX `entries_diary` ON `entries` (`build_id`,`dated_at`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `entries_idempotency_unique` ON `entries` (`author_id`,`idempotency_key`);--> statement-breakpoint
CREATE TABLE `mail_settings` (
	`user_id` text PRIMARY KEY NOT NULL,
	`cadence` text NOT NULL,
	`hour_local` integer DEFAULT 8 NOT NULL,
	`weekday` integer DEFAULT 5 NOT NULL,
	`next_digest_at` integer,
	`told_seq` integer DEFAULT 0 NOT NULL,
	`lease_owner` text,
	`lease_ends_at` integer,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "mail_settings_cadence_known" CHECK("mail_settings"."cadence" in ('at_once', 'daily', 'weekly', 'none')),
	CONSTRAINT "mail_settings_hour_range" CHECK("mail_settings"."hour_local" between 0 and 23),
	CONSTRAINT "mail_settings_weekday_range" CHECK("mail_settings"."weekday" between 1 and 7)
);
--> statement-breakpoint
CREATE INDEX `mail_settings_due` ON `mail_settings` (`next_digest_at`);--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`user_id` text NOT NULL,
	`about` text NOT NULL,
	`state` text NOT NULL,
	`dedupe_key` text NOT NULL,
	`frozen` text,
	`attempts` integer DEFAULT 0 NOT NULL,
	`next_attempt_at` integer NOT NULL,
	`first_attempt_at` integer,
	`lease_owner` text,
	`lease_ends_at` integer,
	`last_problem` text,
	`provider_id` text,
	`sent_at` integer,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "outbox_state_known" CHECK("outbox"."state" in ('waiting', 'sending', 'sent', 'failed', 'parked', 'dropped'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `outbox_dedupe_unique` ON `outbox` (`dedupe_key`);--> statement-breakpoint
CREATE INDEX `outbox_due` ON `outbox` (`state`,`next_attempt_at`);--> statement-breakpoint
CREATE INDEX `outbox_user` ON `outbox` (`user_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `doomed_objects` (
	`key` text PRIMARY KEY NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`next_attempt_at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `doomed_objects_due` ON `doomed_objects` (`next_attempt_at`);--> statement-breakpoint
CREATE TABLE `photos` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`entry_id` text,
	`uploader_id` text NOT NULL,
	`upload_key` text NOT NULL,
	`state` text NOT NULL,
	`label` text NOT NULL,
	`content_type` text NOT NULL,
	`size_bytes` integer NOT NULL,
	`sha256` text NOT NULL,
	`original_key` text NOT NULL,
	`out_prefix` text,
	`width_px` integer,
	`height_px` integer,
	`blur_data_url` text,
	`variant_widths_px` text,
	`alt` text DEFAULT '' NOT NULL,
	`position` integer DEFAULT 0 NOT NULL,
	`refusal` text,
	`expires_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`entry_id`) REFERENCES `entries`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`uploader_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "photos_state_known" CHECK("photos"."state" in ('granted', 'uploaded', 'ready', 'refused'))
);
--> statement-breakpoint
CREATE INDEX `photos_entry` ON `photos` (`entry_id`,`position`);--> statement-breakpoint
CREATE INDEX `photos_unfinished` ON `photos` (`created_at`) WHERE "photos"."entry_id" is null;--> statement-breakpoint
CREATE UNIQUE INDEX `photos_upload_unique` ON `photos` (`uploader_id`,`upload_key`);--> statement-breakpoint
CREATE TABLE `letters` (
	`id` text PRIMARY KEY NOT NULL,
	`question_id` text NOT NULL,
	`author_id` text NOT NULL,
	`side` text NOT NULL,
	`body` text NOT NULL,
	`body_text` text NOT NULL,
	`idempotency_key` text NOT NULL,
	`written_at` integer NOT NULL,
	FOREIGN KEY (`question_id`) REFERENCES `questions`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "letters_side_known" CHECK("letters"."side" in ('client', 'shop'))
);
--> statement-breakpoint
CREATE INDEX `letters_question` ON `letters` (`question_id`,`written_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `letters_idempotency_unique` ON `letters` (`author_id`,`idempotency_key`);--> statement-breakpoint
CREATE TABLE `questions` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`entry_id` text,
	`topic_id` text NOT NULL,
	`asked_by_id` text NOT NULL,
	`subject` text NOT NULL,
	`pen_holder_id` text,
	`state` text NOT NULL,
	`idempotency_key` text NOT NULL,
	`last_letter_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`entry_id`) REFERENCES `entries`(`id`) ON UPDATE no action ON DELETE set null,
	FOREIGN KEY (`topic_id`) REFERENCES `topics`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`asked_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`pen_holder_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "questions_state_known" CHECK("questions"."state" in ('waiting', 'answered'))
);
--> statement-breakpoint
CREATE INDEX `questions_build` ON `questions` (`build_id`,`last_letter_at`);--> statement-breakpoint
CREATE INDEX `questions_pen` ON `questions` (`pen_holder_id`,`state`,`last_letter_at`);--> statement-breakpoint
CREATE INDEX `questions_state` ON `questions` (`state`,`last_letter_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `questions_idempotency_unique` ON `questions` (`asked_by_id`,`idempotency_key`);--> statement-breakpoint
CREATE TABLE `topics` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`position` integer NOT NULL,
	`answered_by` text NOT NULL,
	`department` text,
	`reps_only` integer DEFAULT false NOT NULL,
	FOREIGN KEY (`department`) REFERENCES `departments`(`key`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "topics_answered_by_known" CHECK("topics"."answered_by" in ('department', 'rep')),
	CONSTRAINT "topics_reps_only_has_no_department" CHECK(not ("topics"."reps_only" and "topics"."answered_by" = 'department'))
);
--> statement-breakpoint
CREATE TABLE `rate_limits` (
	`key` text PRIMARY KEY NOT NULL,
	`level` real NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `route_stages` (
	`id` text PRIMARY KEY NOT NULL,
	`route_id` text NOT NULL,
	`position` integer NOT NULL,
	`key` text NOT NULL,
	`name` text NOT NULL,
	`department` text NOT NULL,
	`usual_days` integer NOT NULL,
	FOREIGN KEY (`route_id`) REFERENCES `routes`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`department`) REFERENCES `departments`(`key`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `route_stages_position_unique` ON `route_stages` (`route_id`,`position`);--> statement-breakpoint
CREATE TABLE `routes` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`token_hash` text NOT NULL,
	`user_id` text NOT NULL,
	`device` text DEFAULT 'a browser' NOT NULL,
	`last_seen_at` integer NOT NULL,
	`idle_ends_at` integer NOT NULL,
	`ends_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sessions_token_unique` ON `sessions` (`token_hash`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE TABLE `departments` (
	`key` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`position` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `shop` (
	`id` integer PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`time_zone` text NOT NULL,
	CONSTRAINT "shop_single" CHECK("shop"."id" = 1)
);
--> statement-breakpoint
CREATE TABLE `sign_in_links` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text,
	`token_hash` text NOT NULL,
	`code_hash` text NOT NULL,
	`browser_hash` text NOT NULL,
	`code_tries` integer DEFAULT 0 NOT NULL,
	`expires_at` integer NOT NULL,
	`claimed_at` integer,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sign_in_links_token_unique` ON `sign_in_links` (`token_hash`);--> statement-breakpoint
CREATE INDEX `sign_in_links_user` ON `sign_in_links` (`user_id`);--> statement-breakpoint
CREATE INDEX `sign_in_links_browser` ON `sign_in_links` (`browser_hash`);--> statement-breakpoint
CREATE INDEX `sign_in_links_expiry` ON `sign_in_links` (`expires_at`);--> statement-breakpoint
CREATE TABLE `users` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`role` text NOT NULL,
	`department` text,
	`time_zone` text DEFAULT 'UTC' NOT NULL,
	`time_zone_asked_at` integer,
	`invited_by_id` text,
	`email_verified_at` integer,
	`disabled_at` integer,
	`created_at` integer NOT NULL,
	CONSTRAINT "users_email_lower" CHECK("users"."email" = lower("users"."email")),
	CONSTRAINT "users_role_known" CHECK("users"."role" in ('buyer', 'artist', 'builder', 'rep', 'admin'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `users_email_unique` ON `users` (`email`);