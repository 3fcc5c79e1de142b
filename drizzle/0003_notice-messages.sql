CREATE TABLE `notice_messages` (
	`notice_id` char(36) character set ascii collate ascii_bin NOT NULL,
	`subject` varchar(300) NOT NULL,
	`html` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`text` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`positions_csv` longtext character set utf8mb4 collate utf8mb4_bin NOT NULL,
	`csv_file_name` varchar(200) NOT NULL,
	`reply_to_name` varchar(200) NOT NULL,
	`reply_to_email` varchar(254) NOT NULL,
	CONSTRAINT `notice_messages_notice_id` PRIMARY KEY(`notice_id`)
);
--> statement-breakpoint
ALTER TABLE `notice_messages` ADD CONSTRAINT `notice_messages_notice_id_notices_id_fk` FOREIGN KEY (`notice_id`) REFERENCES `notices`(`id`) ON DELETE cascade ON UPDATE no action;