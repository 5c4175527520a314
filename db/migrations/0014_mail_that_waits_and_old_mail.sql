ALTER TABLE `news_items` ADD `not_before_at` integer DEFAULT 0 NOT NULL;--> statement-breakpoint
CREATE INDEX `news_items_created` ON `news_items` (`created_at`);--> statement-breakpoint
ALTER TABLE `outbox` ADD `body_dropped_at` integer;--> statement-breakpoint
CREATE INDEX `outbox_bodies` ON `outbox` (`created_at`) WHERE "outbox"."frozen" is not null and "outbox"."body_dropped_at" is null;