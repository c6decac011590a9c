import type { Binding, LimitBinding } from '$lib/core/datasheet/binding';
import type { LimitAddress } from '$lib/core/datasheet/bindPlace';
import type { LimitRow } from '$lib/core/limits/limit';
import type { PolicyVersion } from '$lib/core/limits/policy';
import type { Template } from '$lib/core/template/template';
import type { Connection } from '../db/database';
import type { FoundDraft } from '../db/findDraft';
import { findPolicyVersion } from '../db/findPolicies';
import { capacitanceTable } from './capacitanceTable';
import { characteristicLimits } from './characteristicLimits';
import { limitWantedAt, type CapacitanceWanted, type LimitWanted } from './limitWantedAt';

export interface DraftLimits {
	/** By slot, in the order asked. */
	readonly limits: ReadonlyMap<string, readonly LimitRow[]>;
	readonly policies: ReadonlyMap<number, PolicyVersion>;
}

/**
 * What the measurements say now for every place of a draft: each by the policy and basis of its
 * binding, or by the draft's policy where nothing is bound.
 */
export async function draftLimits(
	db: Connection,
	product: number,
	draft: Pick<FoundDraft, 'template' | 'bindings' | 'policyVersion'>
): Promise<DraftLimits> {
	return computeLimits(db, product, limitsWanted(draft));
}

/**
 * The same for numbers asked one by one. Each table of one condition, policy and basis is read once;
 * a characteristic of which nothing is stored has no row.
 */
export async function computeLimits(
	db: Connection,
	product: number,
	wanted: readonly LimitWanted[]
): Promise<DraftLimits> {
	const limits = new Map<string, LimitRow[]>();
	const capacitances = wanted.filter((one) => one.kind === 'capacitance');
	for (const group of grouped(capacitances)) {
		const [{ temperatureCelsius, frequency, policyVersion, declaredBasis }] = group;
		const table = await capacitanceTable(db, {
			product,
			temperatureCelsius,
			frequency,
			biases: [...new Set(group.map(({ bias }) => bias))].sort((a, b) => a - b),
			policyVersion,
			declaredBasis
		});
		if ('status' in table) continue;
		for (const { slot, bias } of group) {
			const row = table.rows.find(({ condition }) => condition.reverseVoltage === bias);
			if (row !== undefined) limits.set(slot, [...(limits.get(slot) ?? []), row]);
		}
	}
	for (const one of wanted) {
		if (one.kind !== 'characteristic') continue;
		const { slot, condition, ...asked } = one;
		const found = await characteristicLimits(db, { product, ...asked, conditions: [condition] });
		if (!('status' in found)) limits.set(slot, [...found.rows]);
	}
	return { limits, policies: await policiesOf(db, wanted) };
}

async function policiesOf(
	db: Connection,
	wanted: readonly LimitWanted[]
): Promise<ReadonlyMap<number, PolicyVersion>> {
	const policies = new Map<number, PolicyVersion>();
	for (const id of new Set(wanted.map(({ policyVersion }) => policyVersion))) {
		const found = await findPolicyVersion(db, id);
		if (found !== undefined) policies.set(id, found);
	}
	return policies;
}

function limitsWanted({
	template,
	bindings,
	policyVersion
}: Pick<FoundDraft, 'template' | 'bindings' | 'policyVersion'>): LimitWanted[] {
	return limitAddresses(template).flatMap(({ slot, bias }) => {
		const held = heldAt(bindings.get(slot), bias);
		const by = { policyVersion: held?.policyVersion ?? policyVersion, basis: held?.basis };
		return limitWantedAt(template, { slot, bias }, by) ?? [];
	});
}

function limitAddresses({ sections }: Template): LimitAddress[] {
	return sections.flatMap((section): LimitAddress[] => {
		if (section.kind === 'characteristics' || section.kind === 'thermal')
			return section.slots.map(({ slot }) => ({ slot, bias: null }));
		if (section.kind === 'capacitance-table')
			return section.biases.map((bias) => ({ slot: section.slot, bias }));
		return [];
	});
}

function heldAt(held: Binding | undefined, bias: number | null): LimitBinding | undefined {
	const filling =
		held?.kind === 'table' ? held.rows.find((row) => row.bias === bias)?.binding : held;
	return filling?.kind === 'limit' ? filling : undefined;
}

type NonEmpty = [CapacitanceWanted, ...CapacitanceWanted[]];

function grouped(wanted: readonly CapacitanceWanted[]): NonEmpty[] {
	const groups = new Map<string, NonEmpty>();
	for (const one of wanted) {
		const { temperatureCelsius, frequency, policyVersion, declaredBasis } = one;
		const key = [temperatureCelsius, frequency, policyVersion, declaredBasis].join(';');
		const held = groups.get(key);
		if (held === undefined) groups.set(key, [one]);
		else held.push(one);
	}
	return [...groups.values()];
}
