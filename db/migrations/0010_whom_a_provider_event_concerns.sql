ALTER TABLE `provider_events` ADD `user_id` text REFERENCES users(id) ON DELETE set null;--> statement-breakpoint
ALTER TABLE `provider_events` ADD `note` text;