const SIDE_WORDS: Readonly<Record<string, string>> = {
	minimum: 'Minimum',
	typical: 'Typical value',
	maximum: 'Maximum'
};

const side = (part: string) => SIDE_WORDS[part] ?? part;

const signed = (percent: number) =>
	`${percent < 0 ? '−' : '+'}${Math.abs(percent).toPrecision(3)} %`;

export const concernRoutesDiffer = (part: string, percent: number) =>
	`${side(part)} differs from the second route by ${signed(percent)}.`;

export const concernOutside = (part: string, count: number, allowed: number) =>
	`${count} ${count === 1 ? 'device lies' : 'devices lie'} outside the ${part}, ${allowed} allowed.`;

export const concernLoosened = (part: string) =>
	`${side(part)} is loosened against the release before.`;

export const concernRatingChanged = () => 'The rating changed against the release before.';

export const concernOverridden = () => 'Printed by override, not as computed.';

export const concernNothingMeasured = () => 'Typed; nothing measured stands behind it.';

export const concernStruckOut = () => 'The template asks for it and it is not printed.';

export const concernTypedDigits = () => 'Digits typed into text.';

export const concernNoSecondRoute = (reason: string) => `Not recomputed: ${reason}.`;

export const memoMissing = () => 'the stored limit behind it is gone';

export const memoUnreadable = () => 'the stored limit behind it can’t be read';

export const memoDiffers = (stored: string) =>
	`the stored limit says ${stored}, which is not what is printed`;

export const conditionNotMeasured = () => 'no accepted measurement at this condition';

export const secondRouteNote = () =>
	'2nd route: separate reader, factor by integrating the confidence, before rounding; raw values may differ by 0.0001 %';

export const wholeCurveHasOneRoute = () =>
	'a factor for the whole curve is simulated, and there is no second route to it';

export const censoredHasOneRoute = (count: number) =>
	`${count} ${count === 1 ? 'reading is' : 'readings are'} censored, and there is no second route to a censored likelihood`;

export const derivedHasOneRoute = (name: string) =>
	`${name} is computed from several readings of a device, and there is no second route to it`;
