import type { Characteristic } from '../characteristics/catalogue';
import type { Condition } from '../characteristics/condition';
import { measurementMessages } from '../messages/measurements';
import type { DecimalMark } from '../units/readNumber';
import { readNumber } from '../units/readNumber';
import { findUnit, inSi } from '../units/unit';
import type { Unit } from '../units/unit';
import { readCensorFlag, splitMark } from './censorMark';
import type { CensorFlag } from './censorMark';
import type { ColumnMeaning } from './columns';
import { unitOf } from './mapping';
import type { ColumnMapping } from './mapping';
import { asName } from './nameColumn';
import { readingKind } from './readingUnits';
import { recogniseCharacteristic } from './recogniseCharacteristic';
import { decimalsIn } from './scanNumber';
import { splitLine } from './splitLine';

/** What one line of readings says. */
export interface ScalarReading {
	readonly lot: string;
	readonly waferLot: string;
	readonly wafer: string;
	readonly site: string;
	readonly element: string;
	readonly device: string;
	readonly characteristic: Characteristic;
	readonly condition: Condition;
	/** In the line's own unit. */
	readonly value: number;
	readonly unit: Unit;
	readonly censored: CensorFlag;
	/** Decimals the value was written with. */
	readonly decimals: number;
}

export type ReadingLine =
	| { readonly status: 'read'; readonly reading: ScalarReading }
	| { readonly status: 'refused'; readonly message: string };

/** A value of so many base units is how testers mark a reading they couldn't take. */
const OVERFLOW = 1e6;

const CONDITION_COLUMNS = [
	['frequency', 'frequency'],
	['bias', 'reverseVoltage'],
	['forwardCurrent', 'forwardCurrent'],
	['reverseCurrent', 'reverseCurrent'],
	['pulseDuration', 'pulseDuration'],
	['currentSlope', 'currentSlope']
] as const satisfies readonly (readonly [ColumnMeaning, keyof Condition])[];

/** Why a line can't be used, on its way out of the functions below. */
class LineRefusal extends Error {
	override readonly name = 'LineRefusal';
}

/**
 * Reads lines of readings, one a line: which characteristic, at what condition, its value with a
 * unit that is always stated, and whether it is a bound.
 */
export class ReadingLineReader {
	readonly #columnOf: ReadonlyMap<ColumnMeaning, number>;
	readonly #mapping: ColumnMapping;
	readonly #mark: DecimalMark;
	readonly #temperatureCelsius: number | null;

	/**
	 * @param mapping complete, as `mappingProblems` says
	 * @param temperatureCelsius of the whole file, where no column states it
	 */
	constructor(mapping: ColumnMapping, temperatureCelsius: number | null) {
		this.#mapping = mapping;
		this.#mark = mapping.dialect.decimalMark;
		this.#temperatureCelsius = temperatureCelsius;
		this.#columnOf = new Map(
			mapping.columns.map(({ meaning }, position) => [meaning, position] as const)
		);
	}

	read(line: string): ReadingLine {
		const fields = splitLine(line, this.#mapping.dialect.separator);
		if (fields === undefined) return refused(measurementMessages.quoteNotClosed());
		const expected = this.#mapping.columns.length;
		const isTrailing = fields.length === expected + 1 && fields.at(-1) === '';
		if (fields.length !== expected && !isTrailing) {
			return refused(measurementMessages.fieldCount(expected, fields.length));
		}
		try {
			return { status: 'read', reading: this.#reading(fields) };
		} catch (problem) {
			if (problem instanceof LineRefusal) return refused(problem.message);
			throw problem;
		}
	}

	#reading(fields: readonly string[]): ScalarReading {
		const name = (meaning: ColumnMeaning, isNeeded = false) => {
			const read = asName(this.#field(fields, meaning));
			if (read === undefined) refuse(measurementMessages.badBytes());
			if (isNeeded && read === '') refuse(measurementMessages.nameEmpty(meaning));
			return read;
		};
		const names = {
			lot: name('lot', true),
			waferLot: name('waferLot'),
			wafer: name('wafer'),
			site: name('site'),
			element: name('element'),
			device: name('device', true)
		};
		const characteristic = this.#characteristic(name('characteristic', true));
		const condition = this.#condition(fields, characteristic);
		const unit = this.#unit(fields, characteristic);
		return {
			...names,
			characteristic,
			condition,
			unit,
			...this.#value(fields, characteristic, unit)
		};
	}

	#characteristic(read: string): Characteristic {
		const found = recogniseCharacteristic(read);
		if (found === undefined) return refuse(measurementMessages.characteristicUnknown(read));
		if (found.measuredAs === 'sweep') refuse(measurementMessages.characteristicSwept(found.key));
		if (found.measuredAs === 'derived')
			refuse(measurementMessages.characteristicDerived(found.key));
		return found;
	}

	#condition(fields: readonly string[], { key, axes }: Characteristic): Condition {
		const stated: Partial<Record<keyof Condition, number>> = {};
		for (const [meaning, part] of CONDITION_COLUMNS) {
			if (this.#field(fields, meaning) === '') continue;
			if (!axes.some((axis) => axis === part)) {
				refuse(measurementMessages.conditionForeign(key, meaning));
			}
			const value = this.#number(fields, meaning);
			const size =
				meaning === 'bias' && this.#mapping.biasSign === 'reverseNegative' ? -value : value;
			if (part === 'reverseVoltage' ? size < 0 : size <= 0) {
				refuse(measurementMessages.conditionNotPositive(meaning, this.#field(fields, meaning)));
			}
			// Adding zero makes zero of −0.
			stated[part] = size + 0;
		}
		const [first] = axes;
		if (first !== undefined && stated[first] === undefined) {
			const missing = CONDITION_COLUMNS.find(([, part]) => part === first)?.[0] ?? 'ignore';
			refuse(measurementMessages.conditionMissing(key, missing));
		}
		return { temperatureCelsius: this.#temperature(fields), ...stated };
	}

	#temperature(fields: readonly string[]): number {
		if (!this.#columnOf.has('temperature')) {
			return this.#temperatureCelsius ?? refuse(measurementMessages.temperatureMissing());
		}
		const celsius = this.#number(fields, 'temperature');
		if (celsius < -273.15) {
			refuse(measurementMessages.temperatureBelowZero(this.#field(fields, 'temperature')));
		}
		return celsius;
	}

	#unit(fields: readonly string[], { key, unit: base }: Characteristic): Unit {
		const kind = readingKind(base);
		if (kind === undefined) return refuse(measurementMessages.characteristicSwept(key));
		const position = this.#columnOf.get('value');
		const isTold = this.#columnOf.has('unit');
		const symbol = isTold
			? this.#field(fields, 'unit')
			: (this.#mapping.columns[position ?? -1]?.unit ?? '');
		if (symbol === '') return refuse(measurementMessages.unitEmpty());
		return findUnit(kind, symbol) ?? refuse(measurementMessages.unitForeign(key, symbol));
	}

	#value(
		fields: readonly string[],
		{ key, transform }: Characteristic,
		unit: Unit
	): Pick<ScalarReading, 'value' | 'censored' | 'decimals'> {
		const read = this.#field(fields, 'value');
		const { flag: marked, number } = splitMark(read);
		const value = readNumber(number, this.#mark);
		if (value === undefined) return refuse(measurementMessages.notANumber('value', read));
		const flagText = this.#field(fields, 'censored');
		const flagged = readCensorFlag(flagText);
		if (flagged === undefined) return refuse(measurementMessages.flagUnknown(flagText));
		if (marked * flagged === -1) refuse(measurementMessages.flagsDiffer(read, flagText));
		if (transform !== 'identity' && value === 0) refuse(measurementMessages.readingZero(key));
		if (value < 0) refuse(measurementMessages.readingNegative(key, read));
		if (value * unit.scale >= OVERFLOW) refuse(measurementMessages.readingOverflow(key, read));
		return { value, censored: marked === 0 ? flagged : marked, decimals: decimalsIn(number) };
	}

	#number(fields: readonly string[], meaning: ColumnMeaning): number {
		const read = this.#field(fields, meaning);
		const value = readNumber(read, this.#mark);
		const position = this.#columnOf.get(meaning) ?? -1;
		const unit = unitOf(meaning, this.#mapping.columns[position]?.unit ?? null);
		if (value === undefined || unit === undefined) {
			return refuse(measurementMessages.notANumber(meaning, read));
		}
		return inSi(value, unit);
	}

	#field(fields: readonly string[], meaning: ColumnMeaning): string {
		return fields[this.#columnOf.get(meaning) ?? -1] ?? '';
	}
}

function refuse(message: string): never {
	throw new LineRefusal(message);
}

function refused(message: string): ReadingLine {
	return { status: 'refused', message };
}
