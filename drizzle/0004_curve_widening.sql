CREATE TABLE `curve_widening` (
	`inputHash` text PRIMARY KEY NOT NULL,
	`result` text NOT NULL
);
