/** What was measured where, as quarantine and verdicts name it. */
export interface Measured {
	/** Key of a characteristic; `I` for a sweep of the current along the bias. */
	readonly of: string;
	readonly conditionKey: string;
}

/** Capacitance sweeps stand for themselves, so that verdicts on them keep their keys. */
const SWEPT = 'C_tot';
/** What a sweep of the current is called. */
export const CURRENT_SWEEP = 'I';

/** `I_R T=25;VR=60`; for a capacitance sweep the condition alone, `T=25;f=1000000`. */
export function measuredKey({ of, conditionKey }: Measured): string {
	return of === SWEPT ? conditionKey : `${of} ${conditionKey}`;
}

/** What `measuredKey` wrote. */
export function readMeasuredKey(key: string): Measured {
	const space = key.indexOf(' ');
	return space < 0
		? { of: SWEPT, conditionKey: key }
		: { of: key.slice(0, space), conditionKey: key.slice(space + 1) };
}
