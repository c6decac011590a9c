import { error } from '@sveltejs/kit';
import { censoredText } from '$lib/components/characteristics/characteristicRow';
import { csvText } from '$lib/core/csvText';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { characteristicsScreen } from '$lib/server/services/characteristicsScreen';
import { limitsChoice } from '$lib/server/services/limitsChoice';
import type { RequestHandler } from './$types';

const HEAD = [
	'characteristic',
	'condition',
	'minimum',
	'typical',
	'maximum',
	'unit',
	'basis',
	'policy',
	'policy_version',
	'devices',
	'censored',
	'independent_lots',
	'refusals',
	'warnings',
	'trace'
];

/** The table of the screen: the digits as they are printed, one condition a line. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));
	const { policy, basis } = await limitsChoice(locals.db, url.searchParams);
	const groups =
		product.basisHash === null || policy === undefined
			? []
			: (
					await characteristicsScreen(locals.db, {
						product: product.id,
						basisHash: product.basisHash,
						policyVersion: policy.id,
						declaredBasis: basis
					})
				).groups;
	const lines = groups.flatMap(({ rows, distributions }) =>
		rows.map((row) => [
			row.characteristic,
			row.conditionKey,
			row.minimum?.text ?? '',
			row.typical?.text ?? '',
			row.maximum?.text ?? '',
			row.unit,
			row.basis,
			policy?.rules.name ?? '',
			policy?.number ?? '',
			row.sampleSize,
			censoredText(
				distributions.find(({ distribution: of }) => of.conditionKey === row.conditionKey)
					?.distribution.censoring,
				row.sampleSize
			),
			row.independentLots,
			row.refusals.join(' '),
			row.warnings.join(' '),
			row.inputHash
		])
	);
	return new Response(csvText([HEAD, ...lines]), {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': `attachment; filename="${encodeURIComponent(product.partNumber)}-characteristics.csv"`
		}
	});
};
