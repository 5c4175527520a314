CREATE TABLE `mail_choices` (
	`user_id` text NOT NULL,
	`kind` text NOT NULL,
	`choice` text NOT NULL,
	PRIMARY KEY(`user_id`, `kind`),
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "mail_choices_known" CHECK("mail_choices"."choice" in ('at_once', 'digest', 'never'))
);
--> statement-breakpoint
CREATE TABLE `news_items` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`kind` text NOT NULL,
	`about` text NOT NULL,
	`dedupe_key` text NOT NULL,
	`told_at` integer,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `news_items_dedupe_unique` ON `news_items` (`dedupe_key`);--> statement-breakpoint
CREATE INDEX `news_items_untold` ON `news_items` (`user_id`,`told_at`,`created_at`);--> statement-breakpoint
CREATE TABLE `provider_events` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`outcome` text NOT NULL,
	`received_at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `provider_events_received` ON `provider_events` (`received_at`);--> statement-breakpoint
CREATE TABLE `margin_notes` (
	`id` text PRIMARY KEY NOT NULL,
	`question_id` text NOT NULL,
	`author_id` text NOT NULL,
	`body` text NOT NULL,
	`body_text` text NOT NULL,
	`idempotency_key` text NOT NULL,
	`written_at` integer NOT NULL,
	FOREIGN KEY (`question_id`) REFERENCES `questions`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `margin_notes_question` ON `margin_notes` (`question_id`,`written_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `margin_notes_idempotency_unique` ON `margin_notes` (`author_id`,`idempotency_key`);--> statement-breakpoint
CREATE TABLE `pen_passes` (
	`id` text PRIMARY KEY NOT NULL,
	`question_id` text NOT NULL,
	`from_id` text,
	`to_id` text,
	`by_id` text,
	`reason` text NOT NULL,
	`passed_at` integer NOT NULL,
	FOREIGN KEY (`question_id`) REFERENCES `questions`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`from_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`to_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `pen_passes_question` ON `pen_passes` (`question_id`,`passed_at`);--> statement-breakpoint
CREATE TABLE `question_reads` (
	`question_id` text NOT NULL,
	`user_id` text NOT NULL,
	`read_at` integer NOT NULL,
	PRIMARY KEY(`question_id`, `user_id`),
	FOREIGN KEY (`question_id`) REFERENCES `questions`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `saved_phrases` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text,
	`title` text NOT NULL,
	`words` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `saved_phrases_owner` ON `saved_phrases` (`owner_id`,`title`);--> statement-breakpoint
PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_questions` (
	`id` text PRIMARY KEY NOT NULL,
	`build_id` text NOT NULL,
	`entry_id` text,
	`topic_id` text NOT NULL,
	`asked_by_id` text NOT NULL,
	`subject` text NOT NULL,
	`pen_holder_id` text,
	`state` text NOT NULL,
	`due_at` integer,
	`first_answered_at` integer,
	`reminded_before_at` integer,
	`reminded_due_at` integer,
	`overdue_told_at` integer,
	`closed_at` integer,
	`closed_by_id` text,
	`closed_how` text,
	`idempotency_key` text NOT NULL,
	`last_letter_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`entry_id`) REFERENCES `entries`(`id`) ON UPDATE no action ON DELETE set null,
	FOREIGN KEY (`topic_id`) REFERENCES `topics`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`asked_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`pen_holder_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`closed_by_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "questions_state_known" CHECK("__new_questions"."state" in ('waiting', 'answered', 'closed'))
);
--> statement-breakpoint
INSERT INTO `__new_questions`("id", "build_id", "entry_id", "topic_id", "asked_by_id", "subject", "pen_holder_id", "state", "idempotency_key", "last_letter_at", "created_at") SELECT "id", "build_id", "entry_id", "topic_id", "asked_by_id", "subject", "pen_holder_id", "state", "idempotency_key", "last_letter_at", "created_at" FROM `questions`;--> statement-breakpoint
DROP TABLE `questions`;--> statement-breakpoint
ALTER TABLE `__new_questions` RENAME TO `questions`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE INDEX `questions_build` ON `questions` (`build_id`,`last_letter_at`);--> statement-breakpoint
CREATE INDEX `questions_pen` ON `questions` (`pen_holder_id`,`state`,`last_letter_at`);--> statement-breakpoint
CREATE INDEX `questions_state` ON `questions` (`state`,`last_letter_at`);--> statement-breakpoint
CREATE INDEX `questions_due` ON `questions` (`state`,`due_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `questions_idempotency_unique` ON `questions` (`asked_by_id`,`idempotency_key`);--> statement-breakpoint
ALTER TABLE `mail_settings` ADD `quiet_from_hour` integer;--> statement-breakpoint
ALTER TABLE `mail_settings` ADD `quiet_to_hour` integer;--> statement-breakpoint
ALTER TABLE `outbox` ADD `delivered_at` integer;--> statement-breakpoint
ALTER TABLE `outbox` ADD `bounced_at` integer;--> statement-breakpoint
ALTER TABLE `outbox` ADD `complained_at` integer;--> statement-breakpoint
CREATE INDEX `outbox_provider` ON `outbox` (`provider_id`);--> statement-breakpoint
ALTER TABLE `photos` ADD `letter_id` text;--> statement-breakpoint
CREATE INDEX `photos_letter` ON `photos` (`letter_id`,`position`);--> statement-breakpoint
ALTER TABLE `letters` ADD `correctable_until_at` integer;--> statement-breakpoint
ALTER TABLE `letters` ADD `corrected_at` integer;--> statement-breakpoint
ALTER TABLE `letters` ADD `arrived_by` text DEFAULT 'page' NOT NULL;--> statement-breakpoint
ALTER TABLE `topics` ADD `due_hours` integer DEFAULT 8 NOT NULL;--> statement-breakpoint
ALTER TABLE `departments` ADD `lead_id` text;--> statement-breakpoint
ALTER TABLE `shop` ADD `fallback_user_id` text;--> statement-breakpoint
ALTER TABLE `users` ADD `away_from_at` integer;--> statement-breakpoint
ALTER TABLE `users` ADD `away_until_at` integer;--> statement-breakpoint
ALTER TABLE `users` ADD `locale` text DEFAULT 'en-GB' NOT NULL;--> statement-breakpoint
ALTER TABLE `users` ADD `units` text DEFAULT 'in' NOT NULL;--> statement-breakpoint
ALTER TABLE `users` ADD `unreachable_since_at` integer;--> statement-breakpoint
ALTER TABLE `users` ADD `unreachable_why` text;