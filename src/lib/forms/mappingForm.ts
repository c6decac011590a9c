import { z } from 'zod';
import { COLUMN_MEANINGS, MEANING_NAMES, unitsOfMeaning } from '$lib/core/measurements/columns';
import { needsUnit } from '$lib/core/measurements/mapping';
import type { UploadPreview } from '$lib/core/measurements/preview';
import type { RequestedMapping } from '$lib/core/measurements/requestedMapping';
import { requestedMapping } from '$lib/core/measurements/requestedMapping';
import type { MeasurementSetup } from '$lib/core/measurements/setup';
import { EMPTY_SETUP } from '$lib/core/measurements/setup';
import { measurementMessages } from '$lib/core/messages/measurements';
import { decimalOf, numberOf } from '$lib/core/units/decimal';
import { readNumber } from '$lib/core/units/readNumber';

/** The fields of the mapping form as they stand in it: text by name, as a browser posts them. */
export type MappingValues = Readonly<Record<string, string>>;

export const columnField = (position: number, of: 'meaning' | 'unit') => `column-${position}-${of}`;

/** A set-up field that is typed in a handy unit: its power of ten, and what it may be. */
const NUMBERS = {
	signalLevelMillivolts: { power: -3, isAllowed: (value: number) => value > 0 },
	frequencyMegahertz: { power: 6, isAllowed: (value: number) => value > 0 },
	temperatureCelsius: { power: 0, isAllowed: (value: number) => value >= -273.15 },
	uncertaintyPercent: { power: -2, isAllowed: (value: number) => value >= 0 && value < 100 }
} as const;
type NumberField = keyof typeof NUMBERS;

export type MappingFormOutcome =
	| { readonly status: 'read'; readonly request: RequestedMapping }
	| { readonly status: 'wrong'; readonly errors: Readonly<Record<string, readonly string[]>> };

/** What the form shows first: what was confirmed before, else what was recognised. */
export function mappingValues(
	preview: UploadPreview,
	confirmed: {
		readonly mapping: {
			readonly columns: readonly { readonly meaning: string; readonly unit: string | null }[];
			readonly biasSign: string;
		};
		readonly setup: MeasurementSetup;
	} | null
): Record<string, string> {
	const columns = confirmed?.mapping.columns ?? preview.columns;
	const setup = confirmed?.setup ?? EMPTY_SETUP;
	return {
		...Object.fromEntries(
			columns.flatMap(({ meaning, unit }, position) => [
				[columnField(position, 'meaning'), meaning],
				[columnField(position, 'unit'), unit ?? '']
			])
		),
		biasSign: confirmed?.mapping.biasSign ?? preview.biasSign ?? '',
		instrument: setup.instrument,
		note: setup.note,
		signalLevelMillivolts: typed('signalLevelMillivolts', setup.signalLevelVolts),
		frequencyMegahertz: typed('frequencyMegahertz', setup.frequencyHertz),
		temperatureCelsius: typed('temperatureCelsius', setup.temperatureCelsius),
		uncertaintyPercent: typed('uncertaintyPercent', setup.uncertainty),
		waferLots: setup.waferLots.map(({ lot, waferLot }) => `${lot} = ${waferLot}`).join('\n')
	};
}

/** Reads the posted form; errors are by field, so that each stands beside its own. */
export function readMappingForm(values: MappingValues, preview: UploadPreview): MappingFormOutcome {
	const errors: Record<string, string[]> = {};
	const number = (field: NumberField) => {
		const text = values[field]?.trim() ?? '';
		if (text === '') return null;
		const value = readNumber(text);
		const { power, isAllowed } = NUMBERS[field];
		if (value === undefined || !isAllowed(value)) {
			errors[field] = [measurementMessages.setupNumber(field)];
			return null;
		}
		return shifted(value, power);
	};
	const meanings = preview.columns.map((_, position) =>
		z.enum(COLUMN_MEANINGS).catch('ignore').parse(values[columnField(position, 'meaning')])
	);
	const columns = preview.columns.map(({ header }, position) => {
		const meaning = meanings[position] ?? 'ignore';
		const unit = values[columnField(position, 'unit')] ?? '';
		if (needsUnit(meaning, meanings.includes('unit')) && unit === '') {
			errors[columnField(position, 'unit')] = [measurementMessages.unitMissing(header)];
		}
		return { header, meaning, unit: unitsOfMeaning(meaning).length === 0 ? null : unit || null };
	});
	const biasSign = values.biasSign || undefined;
	if (biasSign === undefined && meanings.includes('bias')) {
		errors.biasSign = [measurementMessages.biasSignMissing()];
	}
	const waferLots = readWaferLots(values.waferLots ?? '');
	if (waferLots === undefined) errors.waferLots = [measurementMessages.waferLotLines()];

	const said = {
		columns,
		biasSign,
		skipLines: Number(values.skipLines ?? 0),
		setup: {
			instrument: values.instrument ?? '',
			note: values.note ?? '',
			signalLevelVolts: number('signalLevelMillivolts'),
			frequencyHertz: number('frequencyMegahertz'),
			temperatureCelsius: number('temperatureCelsius'),
			uncertainty: number('uncertaintyPercent'),
			waferLots: waferLots ?? []
		}
	};
	if (Object.keys(errors).length > 0) return { status: 'wrong', errors };
	const request = requestedMapping.safeParse(said);
	if (request.success) return { status: 'read', request: request.data };
	return {
		status: 'wrong',
		errors: Object.fromEntries(
			request.error.issues.map(({ path, message }) => [String(path.at(-1) ?? ''), [message]])
		)
	};
}

/** Choices of the meaning of a column, in order. */
export const MEANING_OPTIONS = COLUMN_MEANINGS.map((value) => ({
	value,
	label: MEANING_NAMES[value]
}));

/** Lines `lot = wafer lot`; `undefined` when a line is anything else. */
function readWaferLots(text: string): { lot: string; waferLot: string }[] | undefined {
	const lines = text
		.split('\n')
		.map((line) => line.trim())
		.filter((line) => line !== '');
	const read = lines.map((line) => line.split('=').map((part) => part.trim()));
	if (read.some((parts) => parts.length !== 2 || parts.includes(''))) return undefined;
	return read.map(([lot = '', waferLot = '']) => ({ lot, waferLot }));
}

function typed(field: NumberField, value: number | null): string {
	return value === null ? '' : String(shifted(value, -NUMBERS[field].power));
}

/** Moves the decimal point, without the error a product would have. */
function shifted(value: number, power: number): number {
	const { digits, exponent } = decimalOf(value);
	return numberOf({ digits, exponent: exponent + power });
}
