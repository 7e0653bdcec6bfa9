CREATE TABLE `audit` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`happened_at` integer NOT NULL,
	`field_id` text,
	`person_id` text,
	`event` text NOT NULL,
	`subject_id` text,
	`details` text DEFAULT '{}' NOT NULL,
	FOREIGN KEY (`field_id`) REFERENCES `fields`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `audit_field` ON `audit` (`field_id`,`happened_at`);--> statement-breakpoint
CREATE TABLE `fields` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`place` text NOT NULL,
	`time_zone` text NOT NULL,
	`rate_multiple_limit` real NOT NULL,
	`loss_fraction` real DEFAULT 0 NOT NULL,
	`set_point_step_m3_per_s` real,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `fields_name_unique` ON `fields` (`name`);--> statement-breakpoint
CREATE TABLE `memberships` (
	`field_id` text NOT NULL,
	`person_id` text NOT NULL,
	`role` text NOT NULL,
	`created_at` integer NOT NULL,
	PRIMARY KEY(`field_id`, `person_id`, `role`),
	FOREIGN KEY (`field_id`) REFERENCES `fields`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `memberships_person` ON `memberships` (`person_id`);--> statement-breakpoint
CREATE TABLE `outages` (
	`id` text PRIMARY KEY NOT NULL,
	`well_id` text NOT NULL,
	`from_week_starts_at` integer NOT NULL,
	`to_week_starts_at` integer NOT NULL,
	`reason` text DEFAULT '' NOT NULL,
	FOREIGN KEY (`well_id`) REFERENCES `wells`(`id`) ON UPDATE no action ON DELETE restrict,
	CONSTRAINT "outages_order" CHECK("outages"."from_week_starts_at" <= "outages"."to_week_starts_at")
);
--> statement-breakpoint
CREATE INDEX `outages_well` ON `outages` (`well_id`);--> statement-breakpoint
CREATE TABLE `reservoir_model_versions` (
	`id` text PRIMARY KEY NOT NULL,
	`field_id` text NOT NULL,
	`number` integer NOT NULL,
	`reservoir` text NOT NULL,
	`seismicity` text NOT NULL,
	`model_version` text NOT NULL,
	`accepted` integer DEFAULT false NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`created_by_id` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`field_id`) REFERENCES `fields`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`created_by_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `model_versions_number` ON `reservoir_model_versions` (`field_id`,`number`);--> statement-breakpoint
CREATE TABLE `wells` (
	`id` text PRIMARY KEY NOT NULL,
	`field_id` text NOT NULL,
	`position` integer NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`x_m` real NOT NULL,
	`y_m` real NOT NULL,
	`radius_m` real,
	`skin` real,
	`control` integer DEFAULT false NOT NULL,
	`min_rate_m3_per_s` real,
	`max_rate_m3_per_s` real,
	`max_change_m3_per_s_per_week` real,
	`min_pressure_pa` real,
	`max_pressure_pa` real,
	`heat_j_per_m3` real,
	FOREIGN KEY (`field_id`) REFERENCES `fields`(`id`) ON UPDATE no action ON DELETE restrict,
	CONSTRAINT "wells_operating_complete" CHECK("wells"."kind" = 'monitor' or ("wells"."radius_m" is not null and "wells"."skin" is not null and "wells"."min_rate_m3_per_s" is not null and "wells"."heat_j_per_m3" is not null))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `wells_field_name` ON `wells` (`field_id`,`name`);--> statement-breakpoint
CREATE TABLE `zones` (
	`model_version_id` text NOT NULL,
	`position` integer NOT NULL,
	`name` text NOT NULL,
	`polygon_m` text NOT NULL,
	`weight` real NOT NULL,
	PRIMARY KEY(`model_version_id`, `name`),
	FOREIGN KEY (`model_version_id`) REFERENCES `reservoir_model_versions`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE TABLE `jobs` (
	`id` text PRIMARY KEY NOT NULL,
	`field_id` text NOT NULL,
	`kind` text NOT NULL,
	`plan_id` text,
	`requested_by_id` text NOT NULL,
	`state` text NOT NULL,
	`revision` integer DEFAULT 1 NOT NULL,
	`progress` real DEFAULT 0 NOT NULL,
	`step` text NOT NULL,
	`seconds_left` real,
	`failure_code` text,
	`failure_message` text,
	`failure_details` text,
	`attempts` integer DEFAULT 0 NOT NULL,
	`input_hash` text NOT NULL,
	`model_version` text NOT NULL,
	`reused_from_id` text,
	`heartbeat_at` integer,
	`created_at` integer NOT NULL,
	`started_at` integer,
	`finished_at` integer,
	FOREIGN KEY (`field_id`) REFERENCES `fields`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`plan_id`) REFERENCES `plans`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`requested_by_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `jobs_field` ON `jobs` (`field_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `jobs_state` ON `jobs` (`state`);--> statement-breakpoint
CREATE INDEX `jobs_input` ON `jobs` (`input_hash`,`model_version`);--> statement-breakpoint
CREATE INDEX `jobs_plan` ON `jobs` (`plan_id`);--> statement-breakpoint
CREATE TABLE `accounts` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`provider_id` text NOT NULL,
	`user_id` text NOT NULL,
	`access_token` text,
	`refresh_token` text,
	`id_token` text,
	`access_token_expires_at` integer,
	`refresh_token_expires_at` integer,
	`scope` text,
	`password` text,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `accounts_user` ON `accounts` (`user_id`);--> statement-breakpoint
CREATE TABLE `people` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`email` text NOT NULL,
	`email_verified` integer DEFAULT false NOT NULL,
	`image` text,
	`is_demo` integer DEFAULT false NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `people_email_unique` ON `people` (`email`);--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`expires_at` integer NOT NULL,
	`token` text NOT NULL,
	`ip_address` text,
	`user_agent` text,
	`user_id` text NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sessions_token_unique` ON `sessions` (`token`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE TABLE `verifications` (
	`id` text PRIMARY KEY NOT NULL,
	`identifier` text NOT NULL,
	`value` text NOT NULL,
	`expires_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `verifications_identifier` ON `verifications` (`identifier`);--> statement-breakpoint
CREATE TABLE `plan_forecast_weeks` (
	`plan_id` text NOT NULL,
	`week` integer NOT NULL,
	`starts_at` integer NOT NULL,
	`look_ahead` integer NOT NULL,
	`expected_events` real NOT NULL,
	`rate_multiple` real NOT NULL,
	`heat_j` real NOT NULL,
	PRIMARY KEY(`plan_id`, `week`),
	FOREIGN KEY (`plan_id`) REFERENCES `plans`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE TABLE `plan_rates` (
	`plan_id` text NOT NULL,
	`well_id` text NOT NULL,
	`week` integer NOT NULL,
	`rate_m3_per_s` real NOT NULL,
	PRIMARY KEY(`plan_id`, `well_id`, `week`),
	FOREIGN KEY (`plan_id`) REFERENCES `plans`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`well_id`) REFERENCES `wells`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE TABLE `plan_results` (
	`plan_id` text PRIMARY KEY NOT NULL,
	`result` text NOT NULL,
	`model_version` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`plan_id`) REFERENCES `plans`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE TABLE `plans` (
	`id` text PRIMARY KEY NOT NULL,
	`field_id` text NOT NULL,
	`number` integer NOT NULL,
	`name` text NOT NULL,
	`notes` text NOT NULL,
	`state` text NOT NULL,
	`built_by_id` text NOT NULL,
	`model_version_id` text NOT NULL,
	`first_week_starts_at` integer NOT NULL,
	`weeks` integer NOT NULL,
	`look_ahead_weeks` integer NOT NULL,
	`objective` text NOT NULL,
	`request` text NOT NULL,
	`scenario` text NOT NULL,
	`input_hash` text NOT NULL,
	`heat_target_j` real NOT NULL,
	`created_at` integer NOT NULL,
	`computed_at` integer,
	`rate_multiple` real,
	`heat_j` real,
	`gap` real,
	FOREIGN KEY (`field_id`) REFERENCES `fields`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`built_by_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE restrict,
	FOREIGN KEY (`model_version_id`) REFERENCES `reservoir_model_versions`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE UNIQUE INDEX `plans_number` ON `plans` (`field_id`,`number`);--> statement-breakpoint
CREATE INDEX `plans_input` ON `plans` (`input_hash`);--> statement-breakpoint
CREATE TABLE `heat_targets` (
	`field_id` text NOT NULL,
	`week_starts_at` integer NOT NULL,
	`heat_j` real NOT NULL,
	PRIMARY KEY(`field_id`, `week_starts_at`),
	FOREIGN KEY (`field_id`) REFERENCES `fields`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE TABLE `metered_rates` (
	`well_id` text NOT NULL,
	`week_starts_at` integer NOT NULL,
	`rate_m3_per_s` real NOT NULL,
	PRIMARY KEY(`well_id`, `week_starts_at`),
	FOREIGN KEY (`well_id`) REFERENCES `wells`(`id`) ON UPDATE no action ON DELETE restrict,
	CONSTRAINT "metered_rates_magnitude" CHECK("metered_rates"."rate_m3_per_s" >= 0)
);
--> statement-breakpoint
CREATE TABLE `seismic_events` (
	`field_id` text NOT NULL,
	`public_id` text NOT NULL,
	`occurred_at` integer NOT NULL,
	`x_m` real NOT NULL,
	`y_m` real NOT NULL,
	`depth_m` real NOT NULL,
	`magnitude` real NOT NULL,
	`magnitude_type` text NOT NULL,
	PRIMARY KEY(`field_id`, `public_id`),
	FOREIGN KEY (`field_id`) REFERENCES `fields`(`id`) ON UPDATE no action ON DELETE restrict
);
--> statement-breakpoint
CREATE INDEX `seismic_events_time` ON `seismic_events` (`field_id`,`occurred_at`);