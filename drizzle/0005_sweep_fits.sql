CREATE TABLE `sweep_fit` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`product` integer NOT NULL,
	`conditionKey` text NOT NULL,
	`basisHash` text NOT NULL,
	`fits` text NOT NULL,
	FOREIGN KEY (`product`) REFERENCES `product`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sweep_fit_once` ON `sweep_fit` (`product`,`conditionKey`,`basisHash`);