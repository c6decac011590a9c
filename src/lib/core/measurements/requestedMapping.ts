import { z } from 'zod';
import { measurementMessages } from '../messages/measurements';
import { columnMeaning, unitsOfMeaning } from './columns';
import { biasSign, columnMapping, mappingProblems } from './mapping';
import type { ColumnMapping } from './mapping';
import type { UploadPreview } from './preview';
import { measurementSetup } from './setup';
import type { MeasurementSetup } from './setup';

/**
 * What somebody says of an uploaded file. What is left out is taken as it was recognised: meanings
 * and units from the header, the bias sign from the way capacitance falls.
 */
export const requestedMapping = z.object({
	/** By header; a column that isn't named here is not used. */
	columns: z
		.array(
			z.object({
				header: z.string(),
				meaning: columnMeaning,
				/** Symbol, as `pF`. */
				unit: z.string().nullable().default(null)
			})
		)
		.optional(),
	biasSign: biasSign.optional(),
	/** So many lines that can't be used are left out; exactly so many, or the file is refused. */
	skipLines: z.number().int().min(0).default(0),
	setup: measurementSetup.default(measurementSetup.parse({}))
});
export type RequestedMapping = z.infer<typeof requestedMapping>;

/** A mapping and the set-up beside it, as an upload keeps them. */
export const confirmedMapping = z.object({
	mapping: columnMapping,
	setup: measurementSetup
});

export type MappingOutcome =
	| {
			readonly status: 'complete';
			readonly mapping: ColumnMapping;
			readonly setup: MeasurementSetup;
	  }
	| { readonly status: 'incomplete'; readonly messages: readonly string[] };

/** Joins what was recognised with what was said. */
export function completeMapping(preview: UploadPreview, said: RequestedMapping): MappingOutcome {
	const headers = preview.columns.map(({ header }) => header);
	const unknown = (said.columns ?? []).filter(({ header }) => !headers.includes(header));
	const sign = said.biasSign ?? preview.biasSign;
	const saidOf = new Map((said.columns ?? []).map((column) => [column.header, column]));
	const columns = preview.columns.map(({ header, meaning, unit }) => {
		const chosen =
			said.columns === undefined
				? { meaning, unit }
				: (saidOf.get(header) ?? { meaning: 'ignore' as const, unit: null });
		return {
			header,
			meaning: chosen.meaning,
			unit: unitsOfMeaning(chosen.meaning).length === 0 ? null : chosen.unit
		};
	});
	const mapping: ColumnMapping = {
		dialect: preview.dialect,
		columns,
		biasSign: sign ?? 'reversePositive',
		skipLines: said.skipLines
	};
	const messages = [
		...unknown.map(({ header }) => measurementMessages.columnUnknown(header)),
		...mappingProblems(mapping, said.setup),
		...(sign === null && columns.some(({ meaning }) => meaning === 'bias')
			? [measurementMessages.biasSignMissing()]
			: [])
	];
	return messages.length === 0
		? { status: 'complete', mapping, setup: said.setup }
		: { status: 'incomplete', messages };
}
