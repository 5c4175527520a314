DROP TRIGGER `entries_search_insert`;
--> statement-breakpoint
DROP TRIGGER `entries_search_update`;
--> statement-breakpoint
DROP TRIGGER `letters_search_insert`;
--> statement-breakpoint
DROP TRIGGER `letters_search_update`;
--> statement-breakpoint
DROP TABLE `search_index`;
--> statement-breakpoint
CREATE VIRTUAL TABLE `search_index` USING fts5(`place`, `words`, content='', contentless_delete=1, tokenize='porter unicode61 remove_diacritics 2', prefix='3');
--> statement-breakpoint
CREATE TRIGGER `entries_search_insert` AFTER INSERT ON `entries`
BEGIN
  INSERT INTO `search_rows`(`kind`, `subject_id`) VALUES ('entry', NEW.`id`);
  INSERT INTO `search_index`(`rowid`, `place`, `words`) VALUES (last_insert_rowid(), hex(NEW.`build_id`), NEW.`body_text`);
END;
--> statement-breakpoint
CREATE TRIGGER `entries_search_update` AFTER UPDATE OF `body_text` ON `entries`
BEGIN
  UPDATE `search_index` SET `place` = hex(NEW.`build_id`), `words` = NEW.`body_text` WHERE `rowid` = (SELECT `seq` FROM `search_rows` WHERE `subject_id` = NEW.`id`);
END;
--> statement-breakpoint
CREATE TRIGGER `letters_search_insert` AFTER INSERT ON `letters`
BEGIN
  INSERT INTO `search_rows`(`kind`, `subject_id`) VALUES ('letter', NEW.`id`);
  INSERT INTO `search_index`(`rowid`, `place`, `words`) VALUES (last_insert_rowid(), (SELECT hex(`build_id`) FROM `questions` WHERE `id` = NEW.`question_id`), NEW.`body_text`);
END;
--> statement-breakpoint
CREATE TRIGGER `letters_search_update` AFTER UPDATE OF `body_text` ON `letters`
BEGIN
  UPDATE `search_index` SET `place` = (SELECT hex(`build_id`) FROM `questions` WHERE `id` = NEW.`question_id`), `words` = NEW.`body_text` WHERE `rowid` = (SELECT `seq` FROM `search_rows` WHERE `subject_id` = NEW.`id`);
END;
--> statement-breakpoint
INSERT INTO `search_index`(`rowid`, `place`, `words`) SELECT `search_rows`.`seq`, hex(`entries`.`build_id`), `entries`.`body_text` FROM `search_rows` JOIN `entries` ON `entries`.`id` = `search_rows`.`subject_id`;
--> statement-breakpoint
INSERT INTO `search_index`(`rowid`, `place`, `words`) SELECT `search_rows`.`seq`, hex(`questions`.`build_id`), `letters`.`body_text` FROM `search_rows` JOIN `letters` ON `letters`.`id` = `search_rows`.`subject_id` JOIN `questions` ON `questions`.`id` = `letters`.`question_id`;
