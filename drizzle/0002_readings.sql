CREATE TABLE `reading_block` (
	`set` integer NOT NULL,
	`characteristic` text NOT NULL,
	`conditionKey` text NOT NULL,
	`repeat` integer NOT NULL,
	`chunk` integer NOT NULL,
	`unitScale` real NOT NULL,
	`values` blob NOT NULL,
	`censored` blob NOT NULL,
	PRIMARY KEY(`set`, `characteristic`, `conditionKey`, `repeat`, `chunk`),
	FOREIGN KEY (`set`) REFERENCES `measurement_set`(`id`) ON UPDATE no action ON DELETE cascade
);
