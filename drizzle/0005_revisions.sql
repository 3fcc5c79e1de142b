CREATE TABLE `concession_reminders` (
	`revision_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`sensor_id` varchar(100) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`decision_ordinal` int NOT NULL,
	`days_before` int NOT NULL,
	`told_at` datetime(3) NOT NULL,
	CONSTRAINT `concession_reminders_pk` PRIMARY KEY(`revision_id`,`sensor_id`,`decision_ordinal`,`days_before`)
);
--> statement-breakpoint
CREATE TABLE `decisions` (
	`revision_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`sensor_id` varchar(100) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`ordinal` int NOT NULL,
	`kind` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`reason` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`expires_on` date,
	`move_to` longtext character set utf8mb4 collate utf8mb4_bin,
	`decided_by` char(36) character set ascii collate ascii_bin,
	`decided_at` datetime(3) NOT NULL,
	CONSTRAINT `decisions_revision_id_sensor_id_ordinal_pk` PRIMARY KEY(`revision_id`,`sensor_id`,`ordinal`)
);
--> statement-breakpoint
CREATE TABLE `plan_editors` (
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`plan_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`user_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`last_version` int NOT NULL,
	`last_edited_at` datetime(3) NOT NULL,
	CONSTRAINT `plan_editors_plan_id_user_id_pk` PRIMARY KEY(`plan_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `revision_comments` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`revision_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`sensor_id` varchar(100) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`text` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`author_id` char(36) character set ascii collate ascii_bin,
	`written_at` datetime(3) NOT NULL,
	CONSTRAINT `revision_comments_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `revision_contents` (
	`revision_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`screening_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`document_version` int NOT NULL,
	`document` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`document_sha256` char(64) character set ascii collate ascii_bin NOT NULL,
	`drawing_id` char(36) character set ascii collate ascii_bin,
	`drawing_sha256` char(64) character set ascii collate ascii_bin,
	`result` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`result_sha256` char(64) character set ascii collate ascii_bin NOT NULL,
	`input_hash` varchar(80) character set ascii collate ascii_bin NOT NULL,
	`engine_version` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`verdict` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`seal_sha256` char(64) character set ascii collate ascii_bin NOT NULL,
	CONSTRAINT `revision_contents_revision_id` PRIMARY KEY(`revision_id`)
);
--> statement-breakpoint
CREATE TABLE `revision_editors` (
	`revision_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`user_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`last_edited_at` datetime(3) NOT NULL,
	CONSTRAINT `revision_editors_revision_id_user_id_pk` PRIMARY KEY(`revision_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `revision_mails` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`revision_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`about` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`to_name` varchar(200) NOT NULL,
	`to_email` varchar(254) NOT NULL,
	`subject` varchar(500) NOT NULL,
	`html` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`text` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	CONSTRAINT `revision_mails_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `revision_positions` (
	`revision_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`sensor_id` varchar(100) character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`sensor_name` varchar(300) NOT NULL,
	`verdict` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`budget_used` double NOT NULL,
	CONSTRAINT `revision_positions_revision_id_sensor_id_pk` PRIMARY KEY(`revision_id`,`sensor_id`)
);
--> statement-breakpoint
CREATE TABLE `revisions` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`plan_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`ordinal` int NOT NULL,
	`state` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`under_review_of` char(36) character set ascii collate ascii_bin,
	`note` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`submitted_by` char(36) character set ascii collate ascii_bin,
	`submitted_at` datetime(3) NOT NULL,
	`closed_by` char(36) character set ascii collate ascii_bin,
	`closed_at` datetime(3),
	`signed_sentence` longtext character set utf8mb4 collate utf8mb4_bin,
	`signed_name` varchar(200),
	`return_reasons` longtext character set utf8mb4 collate utf8mb4_bin,
	`superseded_at` datetime(3),
	CONSTRAINT `revisions_id` PRIMARY KEY(`id`),
	CONSTRAINT `revisions_ordinal` UNIQUE(`plan_id`,`ordinal`),
	CONSTRAINT `revisions_under_review` UNIQUE(`under_review_of`),
	CONSTRAINT `revisions_in_organisation` UNIQUE(`organisation_id`,`id`)
);
--> statement-breakpoint
ALTER TABLE `deliveries` ADD `revision_mail_id` char(36) character set ascii collate ascii_bin;--> statement-breakpoint
ALTER TABLE `pending_sign_ins` ADD `authenticated_at` datetime(3);--> statement-breakpoint
ALTER TABLE `pending_sign_ins` ADD `wants_fresh` boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE `deliveries` ADD CONSTRAINT `deliveries_revision_mail_id_unique` UNIQUE(`revision_mail_id`);--> statement-breakpoint
ALTER TABLE `concession_reminders` ADD CONSTRAINT `concession_reminders_revision_id_revisions_id_fk` FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `decisions` ADD CONSTRAINT `decisions_revision_id_revisions_id_fk` FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `decisions` ADD CONSTRAINT `decisions_decided_by_users_id_fk` FOREIGN KEY (`decided_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plan_editors` ADD CONSTRAINT `plan_editors_plan` FOREIGN KEY (`organisation_id`,`plan_id`) REFERENCES `plans`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plan_editors` ADD CONSTRAINT `plan_editors_user` FOREIGN KEY (`organisation_id`,`user_id`) REFERENCES `users`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_comments` ADD CONSTRAINT `revision_comments_revision_id_revisions_id_fk` FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_comments` ADD CONSTRAINT `revision_comments_author_id_users_id_fk` FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_contents` ADD CONSTRAINT `revision_contents_revision_id_revisions_id_fk` FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_contents` ADD CONSTRAINT `revision_contents_screening_id_screenings_id_fk` FOREIGN KEY (`screening_id`) REFERENCES `screenings`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_editors` ADD CONSTRAINT `revision_editors_revision_id_revisions_id_fk` FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_editors` ADD CONSTRAINT `revision_editors_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_mails` ADD CONSTRAINT `revision_mails_revision_id_revisions_id_fk` FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_positions` ADD CONSTRAINT `revision_positions_revision_id_revisions_id_fk` FOREIGN KEY (`revision_id`) REFERENCES `revisions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revisions` ADD CONSTRAINT `revisions_submitted_by_users_id_fk` FOREIGN KEY (`submitted_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revisions` ADD CONSTRAINT `revisions_closed_by_users_id_fk` FOREIGN KEY (`closed_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revisions` ADD CONSTRAINT `revisions_plan` FOREIGN KEY (`organisation_id`,`plan_id`) REFERENCES `plans`(`organisation_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `decisions_expiry` ON `decisions` (`expires_on`);--> statement-breakpoint
CREATE INDEX `revision_comments_position` ON `revision_comments` (`revision_id`,`sensor_id`,`written_at`);--> statement-breakpoint
CREATE INDEX `revision_mails_revision` ON `revision_mails` (`revision_id`);--> statement-breakpoint
CREATE INDEX `revisions_state` ON `revisions` (`organisation_id`,`state`);--> statement-breakpoint
ALTER TABLE `deliveries` ADD CONSTRAINT `deliveries_revision_mail_id_revision_mails_id_fk` FOREIGN KEY (`revision_mail_id`) REFERENCES `revision_mails`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
INSERT INTO `plan_editors` (`organisation_id`, `plan_id`, `user_id`, `last_version`, `last_edited_at`) SELECT `plans`.`organisation_id`, `plans`.`id`, `plan_documents`.`saved_by`, `plan_documents`.`version`, `plan_documents`.`saved_at` FROM `plan_documents` JOIN `plans` ON `plans`.`id` = `plan_documents`.`plan_id` WHERE `plan_documents`.`saved_by` IS NOT NULL;
