CREATE TABLE `limit_override` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`characteristic` text NOT NULL,
	`conditionKey` text NOT NULL,
	`policyVersion` integer NOT NULL,
	`basis` text NOT NULL,
	`decision` text,
	`reason` text NOT NULL,
	`by` text NOT NULL,
	`at` text NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`policyVersion`) REFERENCES `policy_version`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`by`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `limit_override_of` ON `limit_override` (`product`,`characteristic`);