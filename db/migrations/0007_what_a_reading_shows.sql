ALTER TABLE `proofs` ADD `label` text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE `readings` ADD `shown` text;