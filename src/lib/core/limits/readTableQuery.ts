import { limitMessages } from '../messages/limits';
import { readNumber } from '../units/readNumber';
import { BASES, type Basis } from './basis';

/** What an address can ask of a capacitance table. */
export interface TableQuery {
	readonly temperatureCelsius: number;
	/** Hz. */
	readonly frequency: number | undefined;
	/** V; `undefined` asks for every measured bias. */
	readonly biases: readonly number[] | undefined;
	/** Id of a policy version; `undefined` asks for the first policy. */
	readonly policy: number | undefined;
	readonly basis: Basis | undefined;
}

export type ReadTableQuery =
	| { readonly status: 'read'; readonly query: TableQuery }
	| { readonly status: 'refused'; readonly parameter: string; readonly message: string };

const MOST_BIASES = 1000;

/** Reads the query of a table's address; what can't be read is refused by the parameter's name. */
export function readTableQuery(search: {
	readonly get: (name: string) => string | null;
}): ReadTableQuery {
	const text = (name: string) => search.get(name) ?? undefined;
	const refuse = (parameter: string, message: string): ReadTableQuery => ({
		status: 'refused',
		parameter,
		message
	});

	const temperature = readNumber(text('temperatureCelsius') ?? '');
	if (temperature === undefined) {
		return refuse(
			'temperatureCelsius',
			limitMessages.expectsTemperature(text('temperatureCelsius'))
		);
	}
	const frequency =
		text('frequency') === undefined ? undefined : readNumber(text('frequency') ?? '');
	if (text('frequency') !== undefined && !(frequency !== undefined && frequency > 0)) {
		return refuse('frequency', limitMessages.expectsFrequency(text('frequency')));
	}
	const written = text('biases')?.split(',');
	const biases = written?.map((bias) => readNumber(bias));
	if (biases?.some((bias) => bias === undefined) || (biases?.length ?? 0) > MOST_BIASES) {
		return refuse('biases', limitMessages.expectsBiases(text('biases')));
	}
	const policy = text('policy') === undefined ? undefined : readNumber(text('policy') ?? '');
	if (text('policy') !== undefined && !Number.isSafeInteger(policy)) {
		return refuse('policy', limitMessages.expectsPolicy(text('policy')));
	}
	const basis = BASES.find((known) => known === text('basis'));
	if (text('basis') !== undefined && basis === undefined) {
		return refuse('basis', limitMessages.expectsBasis(text('basis'), BASES));
	}
	return {
		status: 'read',
		query: {
			temperatureCelsius: temperature,
			frequency,
			biases: biases?.filter((bias) => bias !== undefined),
			policy,
			basis
		}
	};
}
