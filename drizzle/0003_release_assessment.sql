CREATE TABLE `release_assessment` (
	`release` integer PRIMARY KEY NOT NULL,
	`basisHash` text NOT NULL,
	`rows` text NOT NULL,
	`at` text NOT NULL,
	FOREIGN KEY (`release`) REFERENCES `release`(`id`) ON UPDATE no action ON DELETE cascade
);
