CREATE TABLE `run_results` (
	`run_id` varchar(32) NOT NULL,
	`part` int NOT NULL,
	`bytes` longblob NOT NULL,
	CONSTRAINT `run_results_run_id_part_pk` PRIMARY KEY(`run_id`,`part`)
);
--> statement-breakpoint
ALTER TABLE `projects` ADD `notes` text NOT NULL;--> statement-breakpoint
ALTER TABLE `runs` ADD `year` int NOT NULL;--> statement-breakpoint
ALTER TABLE `runs` ADD `step_minutes` int NOT NULL;--> statement-breakpoint
ALTER TABLE `runs` ADD `tree_years` double NOT NULL;--> statement-breakpoint
ALTER TABLE `runs` ADD `lease_id` varchar(32);--> statement-breakpoint
ALTER TABLE `runs` ADD `attempts` int DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE `run_results` ADD CONSTRAINT `run_results_run_id_runs_id_fk` FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON DELETE cascade ON UPDATE no action;