CREATE TABLE `invitation_links` (
	`id` char(64) character set ascii collate ascii_bin NOT NULL,
	`invitation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	CONSTRAINT `invitation_links_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `invitation_sites` (
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`invitation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`site_id` char(36) character set ascii collate ascii_bin NOT NULL,
	CONSTRAINT `invitation_sites_invitation_id_site_id_pk` PRIMARY KEY(`invitation_id`,`site_id`)
);
--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(200) NOT NULL,
	`email` varchar(254) NOT NULL,
	`roles` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`invited_by` char(36) character set ascii collate ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`accepted_at` datetime(3),
	`withdrawn_at` datetime(3),
	CONSTRAINT `invitations_id` PRIMARY KEY(`id`),
	CONSTRAINT `invitations_in_organisation` UNIQUE(`organisation_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `activity_heads` (
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`sequence` int NOT NULL,
	`hash` char(64) character set ascii collate ascii_bin NOT NULL,
	CONSTRAINT `activity_heads_organisation_id` PRIMARY KEY(`organisation_id`)
);
--> statement-breakpoint
ALTER TABLE `activity_log` DROP FOREIGN KEY `activity_log_organisation_id_organisations_id_fk`;
--> statement-breakpoint
ALTER TABLE `deliveries` ADD `invitation_id` char(36) character set ascii collate ascii_bin;--> statement-breakpoint
ALTER TABLE `activity_log` ADD `sequence` int NOT NULL;--> statement-breakpoint
ALTER TABLE `activity_log` ADD `previous_hash` char(64) character set ascii collate ascii_bin NOT NULL;--> statement-breakpoint
ALTER TABLE `activity_log` ADD `hash` char(64) character set ascii collate ascii_bin NOT NULL;--> statement-breakpoint
ALTER TABLE `pending_sign_ins` ADD `invitation_link_id` char(64) character set ascii collate ascii_bin;--> statement-breakpoint
ALTER TABLE `users` ADD `removed_at` datetime(3);--> statement-breakpoint
ALTER TABLE `users` ADD `erased_at` datetime(3);--> statement-breakpoint
INSERT INTO `activity_heads` (`organisation_id`, `sequence`, `hash`) SELECT `id`, 0, repeat('0', 64) FROM `organisations`;--> statement-breakpoint
UPDATE `activity_log` JOIN (SELECT `id`, row_number() OVER (PARTITION BY `organisation_id` ORDER BY `at`, `id`) AS `place` FROM `activity_log`) AS `ordered` ON `ordered`.`id` = `activity_log`.`id` SET `activity_log`.`sequence` = `ordered`.`place`;--> statement-breakpoint
ALTER TABLE `activity_log` ADD CONSTRAINT `activity_log_sequence` UNIQUE(`organisation_id`,`sequence`);--> statement-breakpoint
ALTER TABLE `invitation_links` ADD CONSTRAINT `invitation_links_invitation_id_invitations_id_fk` FOREIGN KEY (`invitation_id`) REFERENCES `invitations`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitation_sites` ADD CONSTRAINT `invitation_sites_invitation` FOREIGN KEY (`organisation_id`,`invitation_id`) REFERENCES `invitations`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitation_sites` ADD CONSTRAINT `invitation_sites_site` FOREIGN KEY (`organisation_id`,`site_id`) REFERENCES `sites`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_inviter` FOREIGN KEY (`organisation_id`,`invited_by`) REFERENCES `users`(`organisation_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `activity_heads` ADD CONSTRAINT `activity_heads_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `invitation_links_expiry` ON `invitation_links` (`expires_at`);--> statement-breakpoint
CREATE INDEX `invitations_email` ON `invitations` (`organisation_id`,`email`);--> statement-breakpoint
ALTER TABLE `deliveries` ADD CONSTRAINT `deliveries_invitation_id_invitations_id_fk` FOREIGN KEY (`invitation_id`) REFERENCES `invitations`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `activity_log` ADD CONSTRAINT `activity_log_organisation_id_activity_heads_organisation_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `activity_heads`(`organisation_id`) ON DELETE no action ON UPDATE no action;