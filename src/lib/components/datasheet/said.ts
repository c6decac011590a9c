/** What an action of the datasheet page says back. */
export interface Said {
	readonly isRefused?: boolean;
	readonly message: string;
	/** The slot or text block it is about; left out for the draft as a whole. */
	readonly place?: string;
	/** What was typed, handed back so that nothing is lost. */
	readonly typed?: Readonly<Record<string, string>>;
	/** The text somebody else wrote meanwhile. */
	readonly theirs?: string;
	/** What *bind everything* left, and why. */
	readonly left?: readonly { readonly label: string; readonly why: string }[];
	/** Why a submission was refused, one by one. */
	readonly problems?: readonly string[];
}

/** One shape for every answer, so that the page reads them alike. */
export function said({ isRefused = false, ...rest }: Said) {
	return {
		said: { place: '', typed: {}, theirs: null, left: [], problems: [], ...rest, isRefused }
	};
}
export type SaidBack = ReturnType<typeof said>['said'];
