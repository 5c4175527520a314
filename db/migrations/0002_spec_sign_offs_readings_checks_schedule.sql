CREATE TABLE `check_lines` (
	`id` text PRIMARY KEY NOT NULL,
	`list_id` text NOT NULL,
	`position` integer NOT NULL,
	`text` text NOT NULL,
	`photo_needed` integer DEFAULT false NOT NULL,
	FOREIGN KEY (`list_id`) REFERENCES `check_lists`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `check_lines_list` ON `check_lines` (`list_id`,`position`);--> statement-breakpoint
CREATE TABLE `check_lists` (
	`id` text PRIMARY KEY NOT NULL,
	`route_id` text NOT NULL,
	`stage_key` text NOT NULL,
	`name` text NOT NULL,
	FOREIGN KEY (`route_id`) REFERENCES `routes`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `check_lists_route` ON `check_lists` (`route_id`,`stage_key`);--> statement-breakpoint
CREATE TABLE `check_marks` (
	`run_id` text NOT NULL,
	`line_id` text NOT NULL,
	`mark` text NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`photo_id` text,
	`marked_by_id` text NOT NULL,
	`marked_at` integer NOT NULL,
	PRIMARY KEY(`run_id`, `line_id`),
	FOREIGN KEY (`run_id`) REFERENCES `check_runs`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`line_id`) REFERENCES `check_lines`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`photo_id`) REFERENCES `photos`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`marked_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "check_marks_known" CHECK("check_marks"."mark" in ('pass', 'fail', 'not_applicable'))
);
--> statement-breakpoint
CREATE TABLE `check_runs` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`stage_id` text NOT NULL,
	`list_id` text NOT NULL,
	`started_by_id` text NOT NULL,
	`started_at` integer NOT NULL,
	`outcome` text,
	`finished_by_id` text,
	`finished_at` integer,
	`back_to_stage_id` text,
	`reason` text,
	`telling` text,
	`told_words` text,
	`decided_by_id` text,
	`decided_at` integer,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`stage_id`) REFERENCES `build_stages`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`list_id`) REFERENCES `check_lists`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`started_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`finished_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`back_to_stage_id`) REFERENCES `build_stages`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`decided_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "check_runs_outcome_known" CHECK("check_runs"."outcome" in ('passed', 'failed'))
);
--> statement-breakpoint
CREATE INDEX `check_runs_build` ON `check_runs` (`build_id`,`started_at`);--> statement-breakpoint
CREATE INDEX `check_runs_telling` ON `check_runs` (`telling`);--> statement-breakpoint
CREATE TABLE `materials` (
	`key` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`papers_may_be_needed` integer NOT NULL,
	`radial_coefficient` real,
	`tangential_coefficient` real,
	CONSTRAINT "materials_kind_known" CHECK("materials"."kind" in ('wood', 'skin', 'shell', 'other'))
);
--> statement-breakpoint
CREATE TABLE `proofs` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`item_key` text NOT NULL,
	`entry_id` text NOT NULL,
	`created_by_id` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`entry_id`) REFERENCES `entries`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`created_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `proofs_item_entry_unique` ON `proofs` (`build_id`,`item_key`,`entry_id`);--> statement-breakpoint
CREATE INDEX `proofs_entry` ON `proofs` (`entry_id`);--> statement-breakpoint
CREATE TABLE `readings` (
	`id` text PRIMARY KEY NOT NULL,
	`entry_id` text NOT NULL,
	`build_id` text NOT NULL,
	`position` integer NOT NULL,
	`value` text NOT NULL,
	`item_key` text,
	FOREIGN KEY (`entry_id`) REFERENCES `entries`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `readings_entry` ON `readings` (`entry_id`,`position`);--> statement-breakpoint
CREATE INDEX `readings_build` ON `readings` (`build_id`,`item_key`);--> statement-breakpoint
CREATE TABLE `closures` (
	`id` text PRIMARY KEY NOT NULL,
	`starts_on` text NOT NULL,
	`ends_on` text NOT NULL,
	`name` text NOT NULL,
	`closes_at_min` integer,
	`is_holiday` integer DEFAULT false NOT NULL,
	CONSTRAINT "closures_order" CHECK("closures"."starts_on" <= "closures"."ends_on")
);
--> statement-breakpoint
CREATE INDEX `closures_days` ON `closures` (`starts_on`,`ends_on`);--> statement-breakpoint
CREATE TABLE `quiet_reminders` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`silent_since_at` integer NOT NULL,
	`level` integer NOT NULL,
	`user_id` text NOT NULL,
	`reminded_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `quiet_reminders_once` ON `quiet_reminders` (`build_id`,`silent_since_at`,`level`,`user_id`);--> statement-breakpoint
CREATE INDEX `quiet_reminders_user` ON `quiet_reminders` (`user_id`,`reminded_at`);--> statement-breakpoint
CREATE TABLE `ready_windows` (
	`build_id` text NOT NULL,
	`given_on` text NOT NULL,
	`stage_key` text NOT NULL,
	`kind` text NOT NULL,
	`earliest_on` text,
	`likely_on` text,
	`latest_on` text,
	`widened_by` real DEFAULT 1 NOT NULL,
	`moved_why` text,
	`computed_at` integer NOT NULL,
	PRIMARY KEY(`build_id`, `given_on`),
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "ready_windows_kind_known" CHECK("ready_windows"."kind" in ('window', 'waiting', 'unsayable'))
);
--> statement-breakpoint
CREATE INDEX `ready_windows_stage` ON `ready_windows` (`stage_key`,`given_on`);--> statement-breakpoint
CREATE TABLE `stage_moves` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`from_stage_id` text,
	`to_stage_id` text NOT NULL,
	`reason` text,
	`before` text NOT NULL,
	`moved_by_id` text NOT NULL,
	`moved_at` integer NOT NULL,
	`undone_at` integer,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`from_stage_id`) REFERENCES `build_stages`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`to_stage_id`) REFERENCES `build_stages`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`moved_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `stage_moves_build` ON `stage_moves` (`build_id`,`moved_at`);--> statement-breakpoint
CREATE TABLE `working_hours` (
	`weekday` integer NOT NULL,
	`opens_at_min` integer NOT NULL,
	`closes_at_min` integer NOT NULL,
	PRIMARY KEY(`weekday`, `opens_at_min`),
	CONSTRAINT "working_hours_weekday_range" CHECK("working_hours"."weekday" between 1 and 7),
	CONSTRAINT "working_hours_order" CHECK("working_hours"."opens_at_min" >= 0 and "working_hours"."opens_at_min" < "working_hours"."closes_at_min" and "working_hours"."closes_at_min" <= 1440)
);
--> statement-breakpoint
CREATE TABLE `documents` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`kind` text NOT NULL,
	`title` text NOT NULL,
	`item_key` text,
	`photo_id` text,
	`object_key` text,
	`size_bytes` integer,
	`sha256` text,
	`state` text NOT NULL,
	`refusal` text,
	`uploader_id` text NOT NULL,
	`upload_key` text NOT NULL,
	`expires_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`photo_id`) REFERENCES `photos`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`uploader_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "documents_state_known" CHECK("documents"."state" in ('granted', 'ready', 'refused'))
);
--> statement-breakpoint
CREATE INDEX `documents_build` ON `documents` (`build_id`,`created_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `documents_upload_unique` ON `documents` (`uploader_id`,`upload_key`);--> statement-breakpoint
CREATE TABLE `sign_offs` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`kind` text NOT NULL,
	`title` text NOT NULL,
	`message` text DEFAULT '' NOT NULL,
	`spec_version_id` text,
	`document_id` text,
	`change_request_id` text,
	`item_key` text,
	`concession` text,
	`content_hash` text NOT NULL,
	`due_on` text NOT NULL,
	`blocks_stage_key` text,
	`state` text NOT NULL,
	`asked_by_id` text NOT NULL,
	`asked_at` integer NOT NULL,
	`answered_by_id` text,
	`answered_at` integer,
	`signed_name` text,
	`answer` text,
	`session_hash` text,
	`reminded_at` integer,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`spec_version_id`) REFERENCES `spec_versions`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`document_id`) REFERENCES `documents`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`change_request_id`) REFERENCES `change_requests`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`asked_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`answered_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sign_offs_state_known" CHECK("sign_offs"."state" in ('asked', 'signed', 'change_asked', 'superseded', 'withdrawn')),
	CONSTRAINT "sign_offs_signed_has_name" CHECK("sign_offs"."state" <> 'signed' or "sign_offs"."signed_name" is not null)
);
--> statement-breakpoint
CREATE INDEX `sign_offs_build` ON `sign_offs` (`build_id`,`asked_at`);--> statement-breakpoint
CREATE INDEX `sign_offs_open` ON `sign_offs` (`state`,`due_on`);--> statement-breakpoint
CREATE TABLE `change_requests` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`item_key` text NOT NULL,
	`wish` text NOT NULL,
	`state` text NOT NULL,
	`asked_by_id` text NOT NULL,
	`price_cents` integer,
	`extra_days` integer,
	`offered_by_id` text,
	`offered_at` integer,
	`answer` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`asked_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`offered_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "change_requests_state_known" CHECK("change_requests"."state" in ('asked', 'offered', 'signed', 'declined'))
);
--> statement-breakpoint
CREATE INDEX `change_requests_build` ON `change_requests` (`build_id`,`created_at`);--> statement-breakpoint
CREATE TABLE `spec_drafts` (
	`build_id` text PRIMARY KEY NOT NULL,
	`document` text NOT NULL,
	`revision` integer DEFAULT 1 NOT NULL,
	`edited_by_id` text NOT NULL,
	`edited_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`edited_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `spec_templates` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`document` text NOT NULL,
	`position` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `spec_versions` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`number` integer NOT NULL,
	`document` text NOT NULL,
	`content_hash` text NOT NULL,
	`sent_by_id` text NOT NULL,
	`sent_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`sent_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `spec_versions_number_unique` ON `spec_versions` (`build_id`,`number`);--> statement-breakpoint
ALTER TABLE `build_stages` ADD `work` text DEFAULT 'body' NOT NULL;--> statement-breakpoint
ALTER TABLE `builds` ADD `ready_at` integer;--> statement-breakpoint
ALTER TABLE `builds` ADD `shipped_at` integer;--> statement-breakpoint
ALTER TABLE `builds` ADD `shipped_by` text;--> statement-breakpoint
ALTER TABLE `route_stages` ADD `work` text DEFAULT 'body' NOT NULL;--> statement-breakpoint
ALTER TABLE `route_stages` ADD `best_days` integer;--> statement-breakpoint
ALTER TABLE `route_stages` ADD `likely_days` integer;--> statement-breakpoint
ALTER TABLE `route_stages` ADD `worst_days` integer;--> statement-breakpoint
ALTER TABLE `route_stages` ADD `minimum_wait_days` integer DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE `route_stages` ADD `silence_days` integer DEFAULT 14 NOT NULL;--> statement-breakpoint
ALTER TABLE `departments` ADD `capacity_per_week` integer;--> statement-breakpoint
ALTER TABLE `shop` ADD `holiday_country` text;--> statement-breakpoint
ALTER TABLE `shop` ADD `holiday_region` text;