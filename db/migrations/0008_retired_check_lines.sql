ALTER TABLE `check_lines` ADD `retired_at` integer;--> statement-breakpoint
ALTER TABLE `check_lists` ADD `retired_at` integer;--> statement-breakpoint
CREATE INDEX `check_marks_photo` ON `check_marks` (`photo_id`);
