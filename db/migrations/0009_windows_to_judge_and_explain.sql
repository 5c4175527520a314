ALTER TABLE `ready_windows` ADD `words` text;--> statement-breakpoint
ALTER TABLE `ready_windows` ADD `raw_earliest_on` text;--> statement-breakpoint
ALTER TABLE `ready_windows` ADD `raw_latest_on` text;--> statement-breakpoint
ALTER TABLE `ready_windows` ADD `yardstick_days` real;--> statement-breakpoint
ALTER TABLE `ready_windows` ADD `curve` text;--> statement-breakpoint
ALTER TABLE `ready_windows` ADD `grounds` text;--> statement-breakpoint
ALTER TABLE `shop` ADD `schedule_changed_at` integer DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE `shop` ADD `windows_computed_at` integer DEFAULT 0 NOT NULL;