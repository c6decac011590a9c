import { CHARACTERISTICS } from '$lib/core/characteristics/catalogue';
import { conditionText } from '$lib/core/datasheet/conditionText';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { dataCoverage, type DataCoverage } from '$lib/core/limits/dataCoverage';
import type { Database } from '../db/database';
import { listCoverageCounts, type MeasuredCount } from '../db/listCoverageCounts';

/** What was measured of a product, by characteristic, condition and lot; empty without data. */
export async function productCoverage(
	db: Database,
	product: { readonly id: number; readonly basisHash: string | null }
): Promise<DataCoverage> {
	if (product.basisHash === null) return dataCoverage([]);
	const counts = await listCoverageCounts(db, {
		product: product.id,
		basisHash: product.basisHash
	});
	return dataCoverage(counts.map(inWords).toSorted(byPlace));
}

const ORDER = CHARACTERISTICS.map(({ key }): string => key);

function inWords({ conditionKey, ...of }: MeasuredCount) {
	const condition = readConditionKey(conditionKey);
	const characteristic = CHARACTERISTICS.find(({ key }) => key === of.characteristic);
	const { reverseVoltage, ...series } = condition;
	const isSwept = characteristic?.measuredAs === 'sweep';
	return {
		...of,
		series: conditionText(isSwept || reverseVoltage === undefined ? series : condition),
		place: ORDER.indexOf(of.characteristic),
		temperature: condition.temperatureCelsius
	};
}
type InWords = ReturnType<typeof inWords>;

function byPlace(a: InWords, b: InWords): number {
	return (
		a.place - b.place ||
		a.temperature - b.temperature ||
		(a.series < b.series ? -1 : a.series > b.series ? 1 : 0)
	);
}
