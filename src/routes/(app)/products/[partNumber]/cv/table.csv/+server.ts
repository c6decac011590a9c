import { error } from '@sveltejs/kit';
import { csvText } from '$lib/core/csvText';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { chosenCurve } from '$lib/server/services/chosenCurve';
import type { RequestHandler } from './$types';

const HEAD = [
	'temperature_celsius',
	'frequency_hertz',
	'reverse_voltage_volts',
	'minimum',
	'typical',
	'maximum',
	'unit',
	'basis',
	'devices',
	'independent_lots',
	'spread_between_lots_percent',
	'spread_within_lots_percent'
];

/** The table beside the curve, digits as printed. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));
	const { curve } = await chosenCurve(locals.db, product, url.searchParams);

	const percent = (value: number | null) => (value === null ? '' : value.toFixed(3));
	const lines = (curve?.rows ?? []).map(({ limit, betweenPercent, withinPercent }) => [
		limit.condition.temperatureCelsius,
		limit.condition.frequency ?? '',
		limit.condition.reverseVoltage ?? '',
		limit.minimum?.text ?? '',
		limit.typical?.text ?? '',
		limit.maximum?.text ?? '',
		limit.unit,
		limit.basis,
		limit.sampleSize,
		limit.independentLots,
		percent(betweenPercent),
		percent(withinPercent)
	]);
	const name = `${product.partNumber}-cv-${curve?.temperatureCelsius ?? ''}C.csv`;
	return new Response(csvText([HEAD, ...lines]), {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': `attachment; filename="${encodeURIComponent(name)}"`
		}
	});
};
