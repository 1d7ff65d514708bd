ALTER TABLE `layout_revisions` ADD `tracker_count` int DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE `layouts` ADD `tracker_count` int DEFAULT 0 NOT NULL;