CREATE TABLE `entered_distribution` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`characteristic` text NOT NULL,
	`conditionKey` text NOT NULL,
	`entered` text NOT NULL,
	`reason` text NOT NULL,
	`source` text NOT NULL,
	`by` text NOT NULL,
	`at` text NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`by`) REFERENCES `person`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `entered_distribution_by_product` ON `entered_distribution` (`product`,`characteristic`);--> statement-breakpoint
CREATE TABLE `joint_distribution` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`characteristic` text NOT NULL,
	`conditionKey` text NOT NULL,
	`basisHash` text NOT NULL,
	`joint` blob NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `joint_distribution_once` ON `joint_distribution` (`product`,`characteristic`,`conditionKey`,`basisHash`);