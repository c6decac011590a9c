/** A link of a row, and whether it leads to where the person is. */
export interface RowLink {
	readonly href: string;
	readonly label: string;
	readonly isCurrent: boolean;
}

/** A place of the rail. */
export interface Place extends RowLink {
	/** How many things wait there; 0 is left out. */
	readonly count?: number | undefined;
}
