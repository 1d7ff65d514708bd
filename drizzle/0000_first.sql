CREATE TABLE `layout_revisions` (
	`layout_id` varchar(32) NOT NULL,
	`revision` int NOT NULL,
	`document` longtext NOT NULL,
	`author_id` varchar(32),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `layout_revisions_layout_id_revision_pk` PRIMARY KEY(`layout_id`,`revision`)
);
--> statement-breakpoint
CREATE TABLE `layouts` (
	`id` varchar(32) NOT NULL,
	`project_id` varchar(32) NOT NULL,
	`name` varchar(120) NOT NULL,
	`revision` int NOT NULL,
	`document` longtext NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `layouts_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `api_tokens` (
	`id` varchar(32) NOT NULL,
	`user_id` varchar(32) NOT NULL,
	`name` varchar(120) NOT NULL,
	`token_hash` varchar(64) NOT NULL,
	`scopes` longtext NOT NULL,
	`expires_at` datetime(3),
	`last_used_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `api_tokens_id` PRIMARY KEY(`id`),
	CONSTRAINT `api_tokens_hash` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `audit` (
	`id` varchar(32) NOT NULL,
	`actor` varchar(32),
	`action` varchar(80) NOT NULL,
	`subject` varchar(64),
	`detail` longtext,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `audit_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `mailbox` (
	`id` varchar(32) NOT NULL,
	`to` varchar(254) NOT NULL,
	`subject` varchar(255) NOT NULL,
	`text` text NOT NULL,
	`seen` boolean NOT NULL DEFAULT false,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `mailbox_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `password_resets` (
	`token_hash` varchar(64) NOT NULL,
	`user_id` varchar(32) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `password_resets_token_hash` PRIMARY KEY(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` varchar(64) NOT NULL,
	`user_id` varchar(32) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	CONSTRAINT `sessions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sign_in_attempts` (
	`id` varchar(32) NOT NULL,
	`bucket` varchar(80) NOT NULL,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `sign_in_attempts_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `users` (
	`id` varchar(32) NOT NULL,
	`email` varchar(254) NOT NULL,
	`name` varchar(120) NOT NULL,
	`password_hash` varchar(255) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `users_id` PRIMARY KEY(`id`),
	CONSTRAINT `users_email` UNIQUE(`email`)
);
--> statement-breakpoint
CREATE TABLE `plan_files` (
	`plan_id` varchar(32) NOT NULL,
	`name` varchar(120) NOT NULL,
	`media_type` varchar(120) NOT NULL,
	`byte_size` int NOT NULL,
	`sha256` varchar(64) NOT NULL,
	`bytes` longblob NOT NULL,
	CONSTRAINT `plan_files_plan_id_name_pk` PRIMARY KEY(`plan_id`,`name`)
);
--> statement-breakpoint
CREATE TABLE `plans` (
	`id` varchar(32) NOT NULL,
	`project_id` varchar(32) NOT NULL,
	`layout_id` varchar(32),
	`layout_revision` int NOT NULL,
	`revision_letter` varchar(4) NOT NULL,
	`reason` text NOT NULL,
	`issued_by` varchar(32),
	`issued_at` datetime(3) NOT NULL,
	`snapshot` longtext NOT NULL,
	`snapshot_sha256` varchar(64) NOT NULL,
	CONSTRAINT `plans_id` PRIMARY KEY(`id`),
	CONSTRAINT `plans_letter` UNIQUE(`project_id`,`revision_letter`)
);
--> statement-breakpoint
CREATE TABLE `plot_revisions` (
	`project_id` varchar(32) NOT NULL,
	`revision` int NOT NULL,
	`document` longtext NOT NULL,
	`author_id` varchar(32),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `plot_revisions_project_id_revision_pk` PRIMARY KEY(`project_id`,`revision`)
);
--> statement-breakpoint
CREATE TABLE `projects` (
	`id` varchar(32) NOT NULL,
	`team_id` varchar(32) NOT NULL,
	`name` varchar(120) NOT NULL,
	`place` longtext NOT NULL,
	`winter_rule` longtext NOT NULL,
	`plot` longtext NOT NULL,
	`plot_revision` int NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `projects_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `tracker_models` (
	`id` varchar(32) NOT NULL,
	`team_id` varchar(32) NOT NULL,
	`document` longtext NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `tracker_models_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `runs` (
	`id` varchar(32) NOT NULL,
	`project_id` varchar(32) NOT NULL,
	`layout_id` varchar(32) NOT NULL,
	`kind` enum('shade','mounts') NOT NULL,
	`layout_revision` int NOT NULL,
	`plot_revision` int NOT NULL,
	`status` enum('queued','working','done','failed','cancelled') NOT NULL,
	`progress` double NOT NULL DEFAULT 0,
	`stage` varchar(120) NOT NULL DEFAULT '',
	`input_hash` varchar(64) NOT NULL,
	`core_version` varchar(32) NOT NULL,
	`input` longtext NOT NULL,
	`result` longtext,
	`compute_ms` double,
	`error` text,
	`cancel_requested` boolean NOT NULL DEFAULT false,
	`requested_by` varchar(32),
	`created_at` datetime(3) NOT NULL,
	`started_at` datetime(3),
	`finished_at` datetime(3),
	`heartbeat_at` datetime(3),
	CONSTRAINT `runs_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` varchar(32) NOT NULL,
	`token_hash` varchar(64) NOT NULL,
	`email` varchar(254) NOT NULL,
	`role` enum('owner','designer','crew','client') NOT NULL,
	`team_id` varchar(32) NOT NULL,
	`project_id` varchar(32),
	`invited_by` varchar(32),
	`expires_at` datetime(3) NOT NULL,
	`accepted_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `invitations_id` PRIMARY KEY(`id`),
	CONSTRAINT `invitations_hash` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `project_members` (
	`project_id` varchar(32) NOT NULL,
	`user_id` varchar(32) NOT NULL,
	`role` enum('owner','designer','crew','client') NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `project_members_project_id_user_id_pk` PRIMARY KEY(`project_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `team_members` (
	`team_id` varchar(32) NOT NULL,
	`user_id` varchar(32) NOT NULL,
	`role` enum('owner','designer','crew','client') NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `team_members_team_id_user_id_pk` PRIMARY KEY(`team_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `teams` (
	`id` varchar(32) NOT NULL,
	`name` varchar(120) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `teams_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
ALTER TABLE `layout_revisions` ADD CONSTRAINT `layout_revisions_layout_id_layouts_id_fk` FOREIGN KEY (`layout_id`) REFERENCES `layouts`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `layout_revisions` ADD CONSTRAINT `layout_revisions_author_id_users_id_fk` FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `layouts` ADD CONSTRAINT `layouts_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `api_tokens` ADD CONSTRAINT `api_tokens_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `password_resets` ADD CONSTRAINT `password_resets_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sessions` ADD CONSTRAINT `sessions_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plan_files` ADD CONSTRAINT `plan_files_plan_id_plans_id_fk` FOREIGN KEY (`plan_id`) REFERENCES `plans`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plans` ADD CONSTRAINT `plans_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plans` ADD CONSTRAINT `plans_layout_id_layouts_id_fk` FOREIGN KEY (`layout_id`) REFERENCES `layouts`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plans` ADD CONSTRAINT `plans_issued_by_users_id_fk` FOREIGN KEY (`issued_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plot_revisions` ADD CONSTRAINT `plot_revisions_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plot_revisions` ADD CONSTRAINT `plot_revisions_author_id_users_id_fk` FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `projects` ADD CONSTRAINT `projects_team_id_teams_id_fk` FOREIGN KEY (`team_id`) REFERENCES `teams`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `tracker_models` ADD CONSTRAINT `tracker_models_team_id_teams_id_fk` FOREIGN KEY (`team_id`) REFERENCES `teams`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `runs` ADD CONSTRAINT `runs_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `runs` ADD CONSTRAINT `runs_layout_id_layouts_id_fk` FOREIGN KEY (`layout_id`) REFERENCES `layouts`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `runs` ADD CONSTRAINT `runs_requested_by_users_id_fk` FOREIGN KEY (`requested_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_team_id_teams_id_fk` FOREIGN KEY (`team_id`) REFERENCES `teams`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_invited_by_users_id_fk` FOREIGN KEY (`invited_by`) REFERENCES `users`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `project_members` ADD CONSTRAINT `project_members_project_id_projects_id_fk` FOREIGN KEY (`project_id`) REFERENCES `projects`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `project_members` ADD CONSTRAINT `project_members_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `team_members` ADD CONSTRAINT `team_members_team_id_teams_id_fk` FOREIGN KEY (`team_id`) REFERENCES `teams`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `team_members` ADD CONSTRAINT `team_members_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `layouts_project` ON `layouts` (`project_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `api_tokens_user` ON `api_tokens` (`user_id`);--> statement-breakpoint
CREATE INDEX `audit_subject` ON `audit` (`subject`,`at`);--> statement-breakpoint
CREATE INDEX `audit_actor` ON `audit` (`actor`,`at`);--> statement-breakpoint
CREATE INDEX `mailbox_at` ON `mailbox` (`at`);--> statement-breakpoint
CREATE INDEX `password_resets_user` ON `password_resets` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_expiry` ON `sessions` (`expires_at`);--> statement-breakpoint
CREATE INDEX `sign_in_attempts_bucket` ON `sign_in_attempts` (`bucket`,`at`);--> statement-breakpoint
CREATE INDEX `sign_in_attempts_at` ON `sign_in_attempts` (`at`);--> statement-breakpoint
CREATE INDEX `plans_layout` ON `plans` (`layout_id`);--> statement-breakpoint
CREATE INDEX `projects_team` ON `projects` (`team_id`,`updated_at`);--> statement-breakpoint
CREATE INDEX `tracker_models_team` ON `tracker_models` (`team_id`);--> statement-breakpoint
CREATE INDEX `runs_layout` ON `runs` (`layout_id`,`kind`,`created_at`);--> statement-breakpoint
CREATE INDEX `runs_input` ON `runs` (`input_hash`,`kind`);--> statement-breakpoint
CREATE INDEX `runs_status` ON `runs` (`status`,`created_at`);--> statement-breakpoint
CREATE INDEX `runs_project` ON `runs` (`project_id`);--> statement-breakpoint
CREATE INDEX `invitations_team` ON `invitations` (`team_id`);--> statement-breakpoint
CREATE INDEX `invitations_project` ON `invitations` (`project_id`);--> statement-breakpoint
CREATE INDEX `project_members_user` ON `project_members` (`user_id`);--> statement-breakpoint
CREATE INDEX `team_members_user` ON `team_members` (`user_id`);