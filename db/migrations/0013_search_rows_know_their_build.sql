ALTER TABLE `search_rows` ADD `build_id` text DEFAULT '' NOT NULL;--> statement-breakpoint
UPDATE `search_rows` SET `build_id` = coalesce((SELECT `build_id` FROM `entries` WHERE `entries`.`id` = `subject_id`), (SELECT `questions`.`build_id` FROM `letters` JOIN `questions` ON `questions`.`id` = `letters`.`question_id` WHERE `letters`.`id` = `subject_id`), '');
--> statement-breakpoint
DROP TRIGGER `entries_search_insert`;
--> statement-breakpoint
DROP TRIGGER `letters_search_insert`;
--> statement-breakpoint
CREATE TRIGGER `entries_search_insert` AFTER INSERT ON `entries`
BEGIN
  INSERT INTO `search_rows`(`kind`, `subject_id`, `build_id`) VALUES ('entry', NEW.`id`, NEW.`build_id`);
  INSERT INTO `search_index`(`rowid`, `place`, `words`) VALUES (last_insert_rowid(), hex(NEW.`build_id`), NEW.`body_text`);
END;
--> statement-breakpoint
CREATE TRIGGER `letters_search_insert` AFTER INSERT ON `letters`
BEGIN
  INSERT INTO `search_rows`(`kind`, `subject_id`, `build_id`) SELECT 'letter', NEW.`id`, `build_id` FROM `questions` WHERE `id` = NEW.`question_id`;
  INSERT INTO `search_index`(`rowid`, `place`, `words`) SELECT last_insert_rowid(), hex(`build_id`), NEW.`body_text` FROM `questions` WHERE `id` = NEW.`question_id`;
END;
