CREATE TABLE `stateless_screenings` (
	`user_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`run_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	CONSTRAINT `stateless_screenings_user_id` PRIMARY KEY(`user_id`)
);
--> statement-breakpoint
ALTER TABLE `findings` MODIFY COLUMN `sensor_id` varchar(100) character set utf8mb4 collate utf8mb4_bin NOT NULL;--> statement-breakpoint
ALTER TABLE `findings` MODIFY COLUMN `limit_id` varchar(100) character set utf8mb4 collate utf8mb4_bin NOT NULL;--> statement-breakpoint
ALTER TABLE `findings` MODIFY COLUMN `sensor_name` varchar(300) NOT NULL;--> statement-breakpoint
ALTER TABLE `findings` MODIFY COLUMN `load_case_id` varchar(100) character set utf8mb4 collate utf8mb4_bin;--> statement-breakpoint
ALTER TABLE `stateless_screenings` ADD CONSTRAINT `stateless_screenings_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;