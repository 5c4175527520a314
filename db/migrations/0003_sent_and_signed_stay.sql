CREATE TRIGGER `spec_versions_no_update` BEFORE UPDATE ON `spec_versions`
BEGIN SELECT RAISE(ABORT, 'a sent version never changes'); END;
--> statement-breakpoint
CREATE TRIGGER `sign_offs_signed_stay` BEFORE UPDATE ON `sign_offs`
WHEN OLD.`state` = 'signed'
BEGIN SELECT RAISE(ABORT, 'what was signed stays as it was signed'); END;
--> statement-breakpoint
CREATE TRIGGER `sign_offs_subject_stays` BEFORE UPDATE OF `build_id`, `kind`, `spec_version_id`, `document_id`, `change_request_id`, `item_key`, `concession`, `content_hash` ON `sign_offs`
BEGIN SELECT RAISE(ABORT, 'what a sign-off is of never changes'); END;
