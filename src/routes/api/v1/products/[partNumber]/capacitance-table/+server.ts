import { json } from '@sveltejs/kit';
import type { LimitValue } from '$lib/core/limits/limit';
import { readTableQuery } from '$lib/core/limits/readTableQuery';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findPolicyVersion, listPolicies } from '$lib/server/db/findPolicies';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { problem } from '$lib/server/problem';
import { capacitanceTable } from '$lib/server/services/capacitanceTable';
import type { RequestHandler } from './$types';

/** Which parameter of the address a refusal of the service speaks of. */
const PARAMETERS = {
	policyVersion: 'policy',
	temperatureCelsius: 'temperatureCelsius',
	frequency: 'frequency'
} as const;

/** Minimum, typical and maximum capacitance by bias: numbers in `unit`, biases in V. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, limitMessages.noSuchProduct(params.partNumber));

	const read = readTableQuery(url.searchParams);
	if (read.status === 'refused') {
		return problem(400, read.message, { parameter: read.parameter });
	}
	const { query } = read;
	const policy =
		query.policy === undefined
			? (await listPolicies(locals.db))[0]
			: await findPolicyVersion(locals.db, query.policy);
	if (policy === undefined) {
		return problem(400, limitMessages.noSuchPolicy(query.policy), { parameter: 'policy' });
	}

	const table = await capacitanceTable(locals.db, {
		product: product.id,
		temperatureCelsius: query.temperatureCelsius,
		frequency: query.frequency,
		biases: query.biases,
		policyVersion: policy.id,
		declaredBasis: query.basis
	});
	if ('status' in table) {
		return table.parameter === 'product'
			? problem(409, table.message)
			: problem(400, table.message, { parameter: PARAMETERS[table.parameter] });
	}

	const inUnit = (value: LimitValue | null) => (value === null ? null : Number(value.text));
	return json({
		partNumber: product.partNumber,
		unit: table.unit,
		temperatureCelsius: table.temperatureCelsius,
		frequencyHertz: table.frequency ?? null,
		policy: {
			id: policy.id,
			policy: policy.policy,
			number: policy.number,
			name: policy.rules.name
		},
		rows: table.rows.map((row) => ({
			bias: row.condition.reverseVoltage,
			minimum: inUnit(row.minimum),
			typical: inUnit(row.typical),
			maximum: inUnit(row.maximum),
			/** The digits as they are printed, zeros at the end kept. */
			printed: {
				minimum: row.minimum?.text ?? null,
				typical: row.typical?.text ?? null,
				maximum: row.maximum?.text ?? null
			},
			basis: row.basis,
			sampleSize: row.sampleSize,
			independentLots: row.independentLots,
			refusals: row.refusals,
			warnings: row.warnings,
			trace: row.inputHash,
			engineVersion: row.engineVersion
		}))
	});
};
