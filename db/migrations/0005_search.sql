CREATE TABLE `search_rows` (
	`seq` integer PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`subject_id` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `search_rows_subject_unique` ON `search_rows` (`subject_id`);
--> statement-breakpoint
CREATE VIRTUAL TABLE `search_index` USING fts5(`words`, content='', contentless_delete=1, tokenize='unicode61 remove_diacritics 2', prefix='2 3');
--> statement-breakpoint
CREATE TRIGGER `entries_search_insert` AFTER INSERT ON `entries`
BEGIN
  INSERT INTO `search_rows`(`kind`, `subject_id`) VALUES ('entry', NEW.`id`);
  INSERT INTO `search_index`(`rowid`, `words`) VALUES (last_insert_rowid(), NEW.`body_text`);
END;
--> statement-breakpoint
CREATE TRIGGER `entries_search_update` AFTER UPDATE OF `body_text` ON `entries`
BEGIN
  UPDATE `search_index` SET `words` = NEW.`body_text` WHERE `rowid` = (SELECT `seq` FROM `search_rows` WHERE `subject_id` = NEW.`id`);
END;
--> statement-breakpoint
CREATE TRIGGER `entries_search_delete` AFTER DELETE ON `entries`
BEGIN
  DELETE FROM `search_index` WHERE `rowid` = (SELECT `seq` FROM `search_rows` WHERE `subject_id` = OLD.`id`);
  DELETE FROM `search_rows` WHERE `subject_id` = OLD.`id`;
END;
--> statement-breakpoint
INSERT INTO `search_rows`(`kind`, `subject_id`) SELECT 'entry', `id` FROM `entries`;
--> statement-breakpoint
CREATE TRIGGER `letters_search_insert` AFTER INSERT ON `letters`
BEGIN
  INSERT INTO `search_rows`(`kind`, `subject_id`) VALUES ('letter', NEW.`id`);
  INSERT INTO `search_index`(`rowid`, `words`) VALUES (last_insert_rowid(), NEW.`body_text`);
END;
--> statement-breakpoint
CREATE TRIGGER `letters_search_update` AFTER UPDATE OF `body_text` ON `letters`
BEGIN
  UPDATE `search_index` SET `words` = NEW.`body_text` WHERE `rowid` = (SELECT `seq` FROM `search_rows` WHERE `subject_id` = NEW.`id`);
END;
--> statement-breakpoint
CREATE TRIGGER `letters_search_delete` AFTER DELETE ON `letters`
BEGIN
  DELETE FROM `search_index` WHERE `rowid` = (SELECT `seq` FROM `search_rows` WHERE `subject_id` = OLD.`id`);
  DELETE FROM `search_rows` WHERE `subject_id` = OLD.`id`;
END;
--> statement-breakpoint
INSERT INTO `search_rows`(`kind`, `subject_id`) SELECT 'letter', `id` FROM `letters`;
--> statement-breakpoint
INSERT INTO `search_index`(`rowid`, `words`) SELECT `search_rows`.`seq`, `entries`.`body_text` FROM `search_rows` JOIN `entries` ON `entries`.`id` = `search_rows`.`subject_id`;
--> statement-breakpoint
INSERT INTO `search_index`(`rowid`, `words`) SELECT `search_rows`.`seq`, `letters`.`body_text` FROM `search_rows` JOIN `letters` ON `letters`.`id` = `search_rows`.`subject_id`;
