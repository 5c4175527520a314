CREATE INDEX `documents_photo` ON `documents` (`photo_id`);--> statement-breakpoint
CREATE INDEX `sign_offs_document` ON `sign_offs` (`document_id`);--> statement-breakpoint
CREATE INDEX `sign_offs_replaces` ON `sign_offs` (`replaces_id`);