CREATE TABLE `api_token` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`person` text NOT NULL,
	`name` text NOT NULL,
	`hash` text NOT NULL,
	`createdAt` text NOT NULL,
	`lastUsedAt` text,
	`revokedAt` text,
	FOREIGN KEY (`person`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `api_token_hash_unique` ON `api_token` (`hash`);--> statement-breakpoint
CREATE TABLE `audit` (
	`seq` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`prevHash` text NOT NULL,
	`hash` text NOT NULL,
	`at` text NOT NULL,
	`by` text,
	`action` text NOT NULL,
	`subject` text NOT NULL,
	`details` text NOT NULL,
	FOREIGN KEY (`by`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `audit_prevHash_unique` ON `audit` (`prevHash`);--> statement-breakpoint
CREATE UNIQUE INDEX `audit_hash_unique` ON `audit` (`hash`);--> statement-breakpoint
CREATE TABLE `comment` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`revision` integer NOT NULL,
	`row` text,
	`text` text NOT NULL,
	`by` text NOT NULL,
	`at` text NOT NULL,
	FOREIGN KEY (`revision`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`by`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `decision` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`revision` integer NOT NULL,
	`event` text NOT NULL,
	`reason` text DEFAULT '' NOT NULL,
	`by` text NOT NULL,
	`at` text NOT NULL,
	FOREIGN KEY (`revision`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`by`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `device_block` (
	`set` integer NOT NULL,
	`chunk` integer NOT NULL,
	`devices` text NOT NULL,
	PRIMARY KEY(`set`, `chunk`),
	FOREIGN KEY (`set`) REFERENCES `measurement_set`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `die` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`name` text NOT NULL,
	`facts` text NOT NULL,
	`rowVersion` integer DEFAULT 1 NOT NULL,
	`createdAt` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `die_name_unique` ON `die` (`name`);--> statement-breakpoint
CREATE TABLE `distribution` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`characteristic` text NOT NULL,
	`conditionKey` text NOT NULL,
	`basisHash` text NOT NULL,
	`summary` text NOT NULL,
	`groups` blob NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `distribution_once` ON `distribution` (`product`,`characteristic`,`conditionKey`,`basisHash`);--> statement-breakpoint
CREATE TABLE `draft` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`templateVersion` integer NOT NULL,
	`status` text NOT NULL,
	`policyVersion` integer NOT NULL,
	`rowVersion` integer DEFAULT 1 NOT NULL,
	`createdAt` text NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`templateVersion`) REFERENCES `template_version`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`policyVersion`) REFERENCES `policy_version`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `draft_product_unique` ON `draft` (`product`);--> statement-breakpoint
CREATE TABLE `draft_edit` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`draft` integer NOT NULL,
	`person` text NOT NULL,
	`what` text NOT NULL,
	`at` text NOT NULL,
	FOREIGN KEY (`draft`) REFERENCES `draft`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`person`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `draft_edit_by_draft` ON `draft_edit` (`draft`);--> statement-breakpoint
CREATE TABLE `draft_slot` (
	`draft` integer NOT NULL,
	`slot` text NOT NULL,
	`binding` text NOT NULL,
	`rowVersion` integer DEFAULT 1 NOT NULL,
	PRIMARY KEY(`draft`, `slot`),
	FOREIGN KEY (`draft`) REFERENCES `draft`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `draft_text` (
	`draft` integer NOT NULL,
	`block` text NOT NULL,
	`text` text NOT NULL,
	`rowVersion` integer DEFAULT 1 NOT NULL,
	PRIMARY KEY(`draft`, `block`),
	FOREIGN KEY (`draft`) REFERENCES `draft`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `job` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`kind` text NOT NULL,
	`payload` text NOT NULL,
	`dedupeKey` text NOT NULL,
	`state` text NOT NULL,
	`attempt` integer DEFAULT 0 NOT NULL,
	`leaseUntil` text,
	`progress` text,
	`result` text,
	`error` text,
	`createdBy` text,
	`createdAt` text NOT NULL,
	`endedAt` text,
	FOREIGN KEY (`createdBy`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `job_by_state` ON `job` (`state`);--> statement-breakpoint
CREATE UNIQUE INDEX `one_job_a_key` ON `job` (`dedupeKey`) WHERE state in ('queued', 'running');--> statement-breakpoint
CREATE TABLE `limit_memo` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`inputHash` text NOT NULL,
	`policyVersion` integer NOT NULL,
	`engineVersion` text NOT NULL,
	`result` text NOT NULL,
	FOREIGN KEY (`policyVersion`) REFERENCES `policy_version`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `limit_memo_once` ON `limit_memo` (`inputHash`,`policyVersion`,`engineVersion`);--> statement-breakpoint
CREATE TABLE `lot` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`name` text NOT NULL,
	`waferLot` text NOT NULL,
	`epitaxyLot` text,
	`assemblyLot` text,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `lot_product_name_unique` ON `lot` (`product`,`name`);--> statement-breakpoint
CREATE TABLE `measurement_set` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`upload` integer NOT NULL,
	`setup` text NOT NULL,
	`uncertainty` real,
	`state` text NOT NULL,
	`counts` text,
	`acceptedBy` text NOT NULL,
	`acceptedAt` text NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`upload`) REFERENCES `upload`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`acceptedBy`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `measurement_set_by_product` ON `measurement_set` (`product`);--> statement-breakpoint
CREATE TABLE `ordering_code` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`code` text NOT NULL,
	`grade` text NOT NULL,
	`marking` text NOT NULL,
	`packing` text NOT NULL,
	`quantity` integer NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `ordering_code_code_unique` ON `ordering_code` (`code`);--> statement-breakpoint
CREATE INDEX `ordering_code_by_product` ON `ordering_code` (`product`);--> statement-breakpoint
CREATE TABLE `organization_version` (
	`number` integer PRIMARY KEY NOT NULL,
	`json` text NOT NULL,
	`hash` text NOT NULL,
	`createdAt` text NOT NULL,
	`createdBy` text,
	FOREIGN KEY (`createdBy`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `person` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`passwordHash` text NOT NULL,
	`isActive` integer DEFAULT true NOT NULL,
	`createdAt` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `person_email_unique` ON `person` (`email`);--> statement-breakpoint
CREATE TABLE `person_role` (
	`person` text NOT NULL,
	`role` text NOT NULL,
	PRIMARY KEY(`person`, `role`),
	FOREIGN KEY (`person`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `policy_version` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`policy` text NOT NULL,
	`number` integer NOT NULL,
	`json` text NOT NULL,
	`hash` text NOT NULL,
	`createdAt` text NOT NULL,
	`createdBy` text,
	FOREIGN KEY (`createdBy`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `policy_version_policy_number_unique` ON `policy_version` (`policy`,`number`);--> statement-breakpoint
CREATE TABLE `product` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`partNumber` text NOT NULL,
	`die` integer NOT NULL,
	`elements` integer DEFAULT 1 NOT NULL,
	`productClass` text NOT NULL,
	`package` text NOT NULL,
	`description` text DEFAULT '' NOT NULL,
	`basisHash` text,
	`rowVersion` integer DEFAULT 1 NOT NULL,
	`createdAt` text NOT NULL,
	FOREIGN KEY (`die`) REFERENCES `die`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `product_partNumber_unique` ON `product` (`partNumber`);--> statement-breakpoint
CREATE TABLE `release` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`major` integer NOT NULL,
	`minor` integer NOT NULL,
	`revision` integer NOT NULL,
	`previous` integer,
	`record` text NOT NULL,
	`rendererVersion` text NOT NULL,
	`state` text NOT NULL,
	`effectiveFrom` text NOT NULL,
	`publishedBy` text NOT NULL,
	`publishedAt` text NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`revision`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`publishedBy`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `release_revision_unique` ON `release` (`revision`);--> statement-breakpoint
CREATE UNIQUE INDEX `release_product_major_minor_unique` ON `release` (`product`,`major`,`minor`);--> statement-breakpoint
CREATE TABLE `release_file` (
	`release` integer NOT NULL,
	`name` text NOT NULL,
	`mediaType` text NOT NULL,
	`sha256` text NOT NULL,
	`byteSize` integer NOT NULL,
	`storageKey` text NOT NULL,
	PRIMARY KEY(`release`, `name`),
	FOREIGN KEY (`release`) REFERENCES `release`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `revision` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`number` integer NOT NULL,
	`document` blob NOT NULL,
	`sha256` text NOT NULL,
	`state` text NOT NULL,
	`submittedBy` text NOT NULL,
	`submittedAt` text NOT NULL,
	`editors` text NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`submittedBy`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `one_open_revision` ON `revision` (`product`) WHERE state in ('inReview', 'approved');--> statement-breakpoint
CREATE UNIQUE INDEX `revision_product_number_unique` ON `revision` (`product`,`number`);--> statement-breakpoint
CREATE TABLE `session` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`expires_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `session_by_user` ON `session` (`user_id`);--> statement-breakpoint
CREATE TABLE `suspect` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`set` integer NOT NULL,
	`device` integer NOT NULL,
	`conditionKey` text NOT NULL,
	`reason` text NOT NULL,
	FOREIGN KEY (`set`) REFERENCES `measurement_set`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `suspect_by_set` ON `suspect` (`set`);--> statement-breakpoint
CREATE TABLE `sweep_block` (
	`set` integer NOT NULL,
	`quantity` text NOT NULL,
	`conditionKey` text NOT NULL,
	`chunk` integer NOT NULL,
	`gridHash` text NOT NULL,
	`grid` text NOT NULL,
	`unitScale` real NOT NULL,
	`values` blob NOT NULL,
	PRIMARY KEY(`set`, `quantity`, `conditionKey`, `gridHash`, `chunk`),
	FOREIGN KEY (`set`) REFERENCES `measurement_set`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `template_version` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`template` text NOT NULL,
	`number` integer NOT NULL,
	`json` text NOT NULL,
	`hash` text NOT NULL,
	`createdAt` text NOT NULL,
	`createdBy` text,
	FOREIGN KEY (`createdBy`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `template_version_template_number_unique` ON `template_version` (`template`,`number`);--> statement-breakpoint
CREATE TABLE `upload` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`fileName` text NOT NULL,
	`sha256` text NOT NULL,
	`byteSize` integer NOT NULL,
	`storageKey` text NOT NULL,
	`state` text NOT NULL,
	`preview` text,
	`mapping` text,
	`problems` text,
	`uploadedBy` text NOT NULL,
	`uploadedAt` text NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`uploadedBy`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `upload_sha256_unique` ON `upload` (`sha256`);--> statement-breakpoint
CREATE TABLE `verdict` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`set` integer NOT NULL,
	`device` integer NOT NULL,
	`conditionKey` text NOT NULL,
	`decision` text NOT NULL,
	`reason` text NOT NULL,
	`by` text NOT NULL,
	`at` text NOT NULL,
	FOREIGN KEY (`set`) REFERENCES `measurement_set`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`by`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `verdict_by_set` ON `verdict` (`set`);--> statement-breakpoint
CREATE TABLE `verification_row` (
	`revision` integer NOT NULL,
	`row` text NOT NULL,
	`position` integer NOT NULL,
	`evidence` text NOT NULL,
	`state` text NOT NULL,
	`by` text,
	`at` text,
	PRIMARY KEY(`revision`, `row`),
	FOREIGN KEY (`revision`) REFERENCES `revision`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`by`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
