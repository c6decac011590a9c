import { error } from '@sveltejs/kit';
import { csvText } from '$lib/core/csvText';
import type { DecidedLimit } from '$lib/core/limits/decision/limitDecision';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { limitsChoice } from '$lib/server/services/limitsChoice';
import { limitsScreen } from '$lib/server/services/limitsScreen';
import type { RequestHandler } from './$types';

const HEAD = [
	'characteristic',
	'temperature_celsius',
	'frequency_hertz',
	'reverse_voltage_volts',
	'minimum',
	'typical',
	'maximum',
	'unit',
	'basis',
	'decided_by',
	'policy',
	'policy_version',
	'devices',
	'independent_lots',
	'refusals',
	'warnings',
	'trace'
];

/** The limits of the screen: the digits as they are printed, one condition a line. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));
	const { policy, basis } = await limitsChoice(locals.db, url.searchParams);
	const { groups, decided } =
		product.basisHash === null || policy === undefined
			? { groups: [], decided: new Map<string, DecidedLimit>() }
			: await limitsScreen(locals.db, {
					product: product.id,
					basisHash: product.basisHash,
					policyVersion: policy.id,
					declaredBasis: basis,
					rules: policy.rules
				});
	const lines = groups.flatMap(({ rows }) =>
		rows.map((row) => [
			row.characteristic,
			row.condition.temperatureCelsius,
			row.condition.frequency ?? '',
			row.condition.reverseVoltage ?? '',
			row.minimum?.text ?? '',
			row.typical?.text ?? '',
			row.maximum?.text ?? '',
			row.unit,
			row.basis,
			decided.get(row.conditionKey)?.by ?? '',
			policy?.rules.name ?? '',
			policy?.number ?? '',
			row.sampleSize,
			row.independentLots,
			row.refusals.join(' '),
			row.warnings.join(' '),
			row.inputHash
		])
	);
	return new Response(csvText([HEAD, ...lines]), {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': `attachment; filename="${encodeURIComponent(product.partNumber)}-limits.csv"`
		}
	});
};
