CREATE TABLE `deliveries` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`kind` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`recipient_id` char(36) character set ascii collate ascii_bin,
	`user_id` char(36) character set ascii collate ascii_bin,
	`message_id` varchar(128) character set ascii collate ascii_bin NOT NULL,
	`state` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`attempts` int NOT NULL,
	`next_attempt_at` datetime(3) NOT NULL,
	`claimed_until` datetime(3),
	`last_answer` varchar(500),
	`created_at` datetime(3) NOT NULL,
	`sent_at` datetime(3),
	CONSTRAINT `deliveries_id` PRIMARY KEY(`id`),
	CONSTRAINT `deliveries_recipient_id_unique` UNIQUE(`recipient_id`),
	CONSTRAINT `deliveries_message_id_unique` UNIQUE(`message_id`)
);
--> statement-breakpoint
CREATE TABLE `notice_recipients` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`notice_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(200) NOT NULL,
	`email` varchar(254) NOT NULL,
	CONSTRAINT `notice_recipients_id` PRIMARY KEY(`id`),
	CONSTRAINT `notice_recipients_email` UNIQUE(`notice_id`,`email`)
);
--> statement-breakpoint
CREATE TABLE `notices` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`screening_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`kind` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`version` int NOT NULL,
	`state` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`covering_text` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`created_by` char(36) character set ascii collate ascii_bin,
	`created_at` datetime(3) NOT NULL,
	`issued_at` datetime(3),
	CONSTRAINT `notices_id` PRIMARY KEY(`id`),
	CONSTRAINT `notices_version` UNIQUE(`screening_id`,`kind`,`version`)
);
--> statement-breakpoint
CREATE TABLE `activity_log` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`at` datetime(3) NOT NULL,
	`actor_id` char(36) character set ascii collate ascii_bin,
	`event` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`subject_kind` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`subject_id` char(36) character set ascii collate ascii_bin,
	`detail` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	CONSTRAINT `activity_log_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `identities` (
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`issuer` varchar(255) character set ascii collate ascii_bin NOT NULL,
	`subject` varchar(255) character set ascii collate ascii_bin NOT NULL,
	`user_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `identities_organisation_id_issuer_subject_pk` PRIMARY KEY(`organisation_id`,`issuer`,`subject`)
);
--> statement-breakpoint
CREATE TABLE `memberships` (
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`user_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`role` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`granted_at` datetime(3) NOT NULL,
	CONSTRAINT `memberships_user_id_role_pk` PRIMARY KEY(`user_id`,`role`)
);
--> statement-breakpoint
CREATE TABLE `organisations` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`slug` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(200) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `organisations_id` PRIMARY KEY(`id`),
	CONSTRAINT `organisations_slug_unique` UNIQUE(`slug`)
);
--> statement-breakpoint
CREATE TABLE `pending_sign_ins` (
	`id` char(64) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin,
	`state` varchar(128) character set ascii collate ascii_bin NOT NULL,
	`nonce` varchar(128) character set ascii collate ascii_bin NOT NULL,
	`code_verifier` varchar(128) character set ascii collate ascii_bin NOT NULL,
	`return_to` varchar(512) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	CONSTRAINT `pending_sign_ins_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `rate_limits` (
	`bucket` varchar(128) character set ascii collate ascii_bin NOT NULL,
	`window_started_at` datetime(3) NOT NULL,
	`attempts` int NOT NULL,
	CONSTRAINT `rate_limits_bucket_window_started_at_pk` PRIMARY KEY(`bucket`,`window_started_at`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` char(64) character set ascii collate ascii_bin NOT NULL,
	`user_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`last_seen_at` datetime(3) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`authenticated_at` datetime(3) NOT NULL,
	CONSTRAINT `sessions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sign_in_links` (
	`id` char(64) character set ascii collate ascii_bin NOT NULL,
	`user_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`used_at` datetime(3),
	CONSTRAINT `sign_in_links_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `users` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(200) NOT NULL,
	`email` varchar(254) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `users_id` PRIMARY KEY(`id`),
	CONSTRAINT `users_email` UNIQUE(`organisation_id`,`email`),
	CONSTRAINT `users_in_organisation` UNIQUE(`organisation_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `drawings` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`plan_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`storage_key` varchar(128) character set ascii collate ascii_bin NOT NULL,
	`thumbnail_key` varchar(128) character set ascii collate ascii_bin NOT NULL,
	`media_type` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`width_px` int NOT NULL,
	`height_px` int NOT NULL,
	`size_bytes` int NOT NULL,
	`sha256` char(64) character set ascii collate ascii_bin NOT NULL,
	`file_name` varchar(255) NOT NULL,
	`uploaded_by` char(36) character set ascii collate ascii_bin,
	`uploaded_at` datetime(3) NOT NULL,
	CONSTRAINT `drawings_id` PRIMARY KEY(`id`),
	CONSTRAINT `drawings_storage_key_unique` UNIQUE(`storage_key`),
	CONSTRAINT `drawings_thumbnail_key_unique` UNIQUE(`thumbnail_key`)
);
--> statement-breakpoint
CREATE TABLE `findings` (
	`screening_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`sensor_id` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`limit_id` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`sensor_name` varchar(200) NOT NULL,
	`kind` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`limit_value` double NOT NULL,
	`value` double NOT NULL,
	`expanded_uncertainty` double NOT NULL,
	`unit` varchar(8) character set ascii collate ascii_bin NOT NULL,
	`budget_used` double NOT NULL,
	`verdict` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`load_case_id` varchar(64) character set ascii collate ascii_bin,
	CONSTRAINT `findings_screening_id_sensor_id_limit_id_pk` PRIMARY KEY(`screening_id`,`sensor_id`,`limit_id`)
);
--> statement-breakpoint
CREATE TABLE `plan_documents` (
	`plan_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`version` int NOT NULL,
	`document` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`saved_by` char(36) character set ascii collate ascii_bin,
	`saved_at` datetime(3) NOT NULL,
	CONSTRAINT `plan_documents_plan_id` PRIMARY KEY(`plan_id`)
);
--> statement-breakpoint
CREATE TABLE `plans` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`site_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(200) NOT NULL,
	`created_by` char(36) character set ascii collate ascii_bin,
	`created_at` datetime(3) NOT NULL,
	`archived_at` datetime(3),
	CONSTRAINT `plans_id` PRIMARY KEY(`id`),
	CONSTRAINT `plans_name` UNIQUE(`site_id`,`name`),
	CONSTRAINT `plans_in_organisation` UNIQUE(`organisation_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `screenings` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`plan_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`document_version` int NOT NULL,
	`input_hash` varchar(80) character set ascii collate ascii_bin NOT NULL,
	`engine_version` varchar(32) character set ascii collate ascii_bin NOT NULL,
	`verdict` varchar(16) character set ascii collate ascii_bin NOT NULL,
	`document` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`result` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`screened_by` char(36) character set ascii collate ascii_bin,
	`screened_at` datetime(3) NOT NULL,
	CONSTRAINT `screenings_id` PRIMARY KEY(`id`),
	CONSTRAINT `screenings_in_organisation` UNIQUE(`organisation_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `site_assignments` (
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`site_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`user_id` char(36) character set ascii collate ascii_bin NOT NULL,
	CONSTRAINT `site_assignments_site_id_user_id_pk` PRIMARY KEY(`site_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `site_contacts` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`site_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(200) NOT NULL,
	`email` varchar(254) NOT NULL,
	`duty` varchar(200) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `site_contacts_id` PRIMARY KEY(`id`),
	CONSTRAINT `site_contacts_email` UNIQUE(`site_id`,`email`)
);
--> statement-breakpoint
CREATE TABLE `sites` (
	`id` char(36) character set ascii collate ascii_bin NOT NULL,
	`organisation_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`name` varchar(200) NOT NULL,
	`place` varchar(200) NOT NULL,
	`time_zone` varchar(64) character set ascii collate ascii_bin NOT NULL,
	`latitude_deg` double,
	`longitude_deg` double,
	`altitude_m` double,
	`phase_labels` varchar(32) NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`archived_at` datetime(3),
	CONSTRAINT `sites_id` PRIMARY KEY(`id`),
	CONSTRAINT `sites_in_organisation` UNIQUE(`organisation_id`,`id`),
	CONSTRAINT `sites_name` UNIQUE(`organisation_id`,`name`)
);
--> statement-breakpoint
ALTER TABLE `deliveries` ADD CONSTRAINT `deliveries_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `deliveries` ADD CONSTRAINT `deliveries_recipient_id_notice_recipients_id_fk` FOREIGN KEY (`recipient_id`) REFERENCES `notice_recipients`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `deliveries` ADD CONSTRAINT `deliveries_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notice_recipients` ADD CONSTRAINT `notice_recipients_notice_id_notices_id_fk` FOREIGN KEY (`notice_id`) REFERENCES `notices`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notices` ADD CONSTRAINT `notices_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notices` ADD CONSTRAINT `notices_screening` FOREIGN KEY (`organisation_id`,`screening_id`) REFERENCES `screenings`(`organisation_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `activity_log` ADD CONSTRAINT `activity_log_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `identities` ADD CONSTRAINT `identities_user` FOREIGN KEY (`organisation_id`,`user_id`) REFERENCES `users`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `memberships` ADD CONSTRAINT `memberships_user` FOREIGN KEY (`organisation_id`,`user_id`) REFERENCES `users`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `pending_sign_ins` ADD CONSTRAINT `pending_sign_ins_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sessions` ADD CONSTRAINT `sessions_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_in_links` ADD CONSTRAINT `sign_in_links_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `users` ADD CONSTRAINT `users_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `drawings` ADD CONSTRAINT `drawings_uploaded_by_users_id_fk` FOREIGN KEY (`uploaded_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `drawings` ADD CONSTRAINT `drawings_plan_fk` FOREIGN KEY (`organisation_id`,`plan_id`) REFERENCES `plans`(`organisation_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `findings` ADD CONSTRAINT `findings_screening_id_screenings_id_fk` FOREIGN KEY (`screening_id`) REFERENCES `screenings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plan_documents` ADD CONSTRAINT `plan_documents_plan_id_plans_id_fk` FOREIGN KEY (`plan_id`) REFERENCES `plans`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plan_documents` ADD CONSTRAINT `plan_documents_saved_by_users_id_fk` FOREIGN KEY (`saved_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plans` ADD CONSTRAINT `plans_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `plans` ADD CONSTRAINT `plans_site` FOREIGN KEY (`organisation_id`,`site_id`) REFERENCES `sites`(`organisation_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `screenings` ADD CONSTRAINT `screenings_screened_by_users_id_fk` FOREIGN KEY (`screened_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `screenings` ADD CONSTRAINT `screenings_plan_fk` FOREIGN KEY (`organisation_id`,`plan_id`) REFERENCES `plans`(`organisation_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `site_assignments` ADD CONSTRAINT `site_assignments_site` FOREIGN KEY (`organisation_id`,`site_id`) REFERENCES `sites`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `site_assignments` ADD CONSTRAINT `site_assignments_user` FOREIGN KEY (`organisation_id`,`user_id`) REFERENCES `users`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `site_contacts` ADD CONSTRAINT `site_contacts_site` FOREIGN KEY (`organisation_id`,`site_id`) REFERENCES `sites`(`organisation_id`,`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sites` ADD CONSTRAINT `sites_organisation_id_organisations_id_fk` FOREIGN KEY (`organisation_id`) REFERENCES `organisations`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `deliveries_due` ON `deliveries` (`state`,`next_attempt_at`);--> statement-breakpoint
CREATE INDEX `deliveries_organisation` ON `deliveries` (`organisation_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `activity_log_time` ON `activity_log` (`organisation_id`,`at`);--> statement-breakpoint
CREATE INDEX `pending_sign_ins_expiry` ON `pending_sign_ins` (`expires_at`);--> statement-breakpoint
CREATE INDEX `rate_limits_window` ON `rate_limits` (`window_started_at`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_expiry` ON `sessions` (`expires_at`);--> statement-breakpoint
CREATE INDEX `sign_in_links_expiry` ON `sign_in_links` (`expires_at`);--> statement-breakpoint
CREATE INDEX `drawings_plan` ON `drawings` (`plan_id`,`uploaded_at`);--> statement-breakpoint
CREATE INDEX `screenings_plan` ON `screenings` (`plan_id`,`screened_at`);