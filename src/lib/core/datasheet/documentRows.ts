import { symbolText } from '../characteristics/symbol';
import type {
	CapacitanceRow,
	CharacteristicRow,
	DatasheetDocument,
	DocumentSection,
	RatingRow,
	RichText
} from './document';
import { plainText } from './plainText';

export type CapacitanceSection = Extract<DocumentSection, { kind: 'capacitance-table' }>;

/** A row that states numbers, with what its section says about it. */
export type DocumentRow =
	| { readonly kind: 'rating'; readonly label: string; readonly row: RatingRow }
	| { readonly kind: 'characteristic'; readonly label: string; readonly row: CharacteristicRow }
	| {
			readonly kind: 'capacitance';
			readonly label: string;
			readonly row: CapacitanceRow;
			readonly section: CapacitanceSection;
	  };

/** A piece of text that a person wrote: one paragraph or list item, or the masthead's line. */
export interface DocumentText {
	/** Stable while its place is: `features.2`. */
	readonly id: string;
	readonly label: string;
	readonly runs: RichText;
}

/** Every row of the document that states a number, in the order of the sheet. */
export function documentRows(document: DatasheetDocument): DocumentRow[] {
	return document.sections.flatMap((section): DocumentRow[] => {
		switch (section.kind) {
			case 'ratings':
				return section.rows.map((row) => ({ kind: 'rating', label: named(row), row }));
			case 'thermal':
			case 'characteristics':
				return section.rows.map((row) => ({
					kind: 'characteristic',
					label: `${named(row)}, ${row.temperatureCelsius} °C`,
					row
				}));
			case 'capacitance-table':
				return section.rows.map((row) => ({
					kind: 'capacitance',
					label: `C_tot at V_R = ${row.bias.text} V, ${section.temperatureCelsius} °C`,
					row,
					section
				}));
			case 'masthead':
			case 'prose':
			case 'headline-figures':
			case 'terminals':
			case 'ordering':
			case 'capacitance-chart':
			case 'chart':
			case 'outline':
			case 'test-circuit':
			case 'model':
			case 'revision-history':
			case 'notice':
				return [];
			default:
				return section satisfies never;
		}
	});
}

/** Every text that people typed into the draft. */
export function documentTexts(document: DatasheetDocument): DocumentText[] {
	const description: DocumentText = {
		id: 'masthead.description',
		label: 'Description',
		runs: [{ kind: 'text', text: document.description }]
	};
	const prose = document.sections.flatMap((section) =>
		section.kind === 'prose'
			? section.paragraphs.map((runs, place) => ({
					id: `${section.block}.${place + 1}`,
					label: `${section.heading ?? 'Headline'}, ${place + 1}`,
					runs
				}))
			: []
	);
	return [description, ...prose];
}

function named(row: RatingRow | CharacteristicRow): string {
	const conditions = plainText(row.conditions);
	return `${symbolText(row.symbol)} ${row.name}${conditions === '' ? '' : `, ${conditions}`}`;
}
