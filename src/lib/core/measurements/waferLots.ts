import { measurementMessages } from '../messages/measurements';

/** Takes down which wafer lot a lot comes from; says so when it is another than before. */
export function takeWaferLot(
	waferLotOf: Map<string, string>,
	lot: string,
	waferLot: string
): string | undefined {
	if (waferLot === '') return undefined;
	const known = waferLotOf.get(lot);
	if (known === undefined) waferLotOf.set(lot, waferLot);
	return known === undefined || known === waferLot
		? undefined
		: measurementMessages.waferLotTwice(lot, known, waferLot);
}
