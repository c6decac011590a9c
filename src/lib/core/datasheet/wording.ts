/** One piece of wording under its id. */
export interface Wording {
	readonly id: string;
	readonly label: string;
	readonly text: string;
	readonly area: 'text' | 'ordering';
}
