CREATE TRIGGER `audit_events_no_update` BEFORE UPDATE ON `audit_events`
BEGIN SELECT RAISE(ABORT, 'audit events are append-only'); END;
--> statement-breakpoint
CREATE TRIGGER `audit_events_no_delete` BEFORE DELETE ON `audit_events`
BEGIN SELECT RAISE(ABORT, 'audit events are append-only'); END;
--> statement-breakpoint
CREATE TRIGGER `audit_events_no_replace` BEFORE INSERT ON `audit_events`
WHEN EXISTS (SELECT 1 FROM `audit_events` WHERE `seq` = NEW.`seq`)
BEGIN SELECT RAISE(ABORT, 'audit events are append-only'); END;
