import type { DatasheetStatus } from '$lib/core/datasheet/document';
import { findDraftId } from '$lib/server/db/findDraftId';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { listPolicies } from '$lib/server/db/findPolicies';
import { bindEverything } from '$lib/server/services/bindEverything';
import { openDraft } from '$lib/server/services/openDraft';
import { setRating } from '$lib/server/services/setRating';
import { strikeOut } from '$lib/server/services/strikeOut';
import { writeText } from '$lib/server/services/writeText';
import type { Stores } from '$lib/server/work/stores';
import type { DemoPeople } from './people';
import { must } from './must';

interface DemoDraft {
	readonly partNumber: string;
	readonly template: string;
	readonly status: DatasheetStatus;
	readonly texts: Readonly<Record<string, string>>;
	/** Slot → minimum, maximum, why. */
	readonly ratings: Readonly<Record<string, readonly [string, string, string]>>;
	/** Slot → why nothing is stated. */
	readonly struckOut: Readonly<Record<string, string>>;
}

export const DEMO_DRAFTS: readonly DemoDraft[] = [
	{
		partNumber: 'LKT-1130',
		template: 'tuning',
		status: 'production',
		texts: {
			headline:
				'The LKT-1130 tunes a resonant circuit by its bias. Its total capacitance falls from typically {C_tot @ V_R=1 V : typ} at 1 V to {C_tot @ V_R=28 V : typ} at 28 V.',
			features:
				'Limits at fifteen biases, each with its basis\nCapacitance characterized over eight wafer lots\nSurface-mount package with two leads',
			applications:
				'Tracking filters of VHF and UHF receivers\nVoltage-controlled oscillators\nPhase-locked-loop frequency synthesizers\nElectrically tuned small antennas'
		},
		ratings: {
			'ratings.reverse-voltage': [
				'',
				'30',
				'Below the lowest breakdown voltage of the die design.'
			],
			'ratings.repetitive-reverse-voltage': ['', '32', 'Superimposed signal of the test circuit.'],
			'ratings.forward-current': ['', '20', 'Bond wire and die area.'],
			'ratings.junction-temperature': ['-55', '150', 'Mould compound and die attach.'],
			'ratings.storage-temperature': ['-55', '150', 'Mould compound.']
		},
		struckOut: {
			'characteristics.reverse-current':
				'Some readings lie at the floor of the instrument, so that no limit for future lots can be computed.'
		}
	},
	{
		partNumber: 'LKR-2406',
		template: 'rectifier',
		status: 'preliminary',
		texts: {
			headline:
				'The LKR-2406 rectifies with the low forward voltage of a Schottky barrier. Its total capacitance is typically {C_tot @ V_R=4 V : typ} at 4 V.',
			features:
				'No stored charge: it turns off without reverse recovery\nCapacitance stated with limits',
			applications:
				'Output rectifiers of small converters\nReverse-polarity protection\nFreewheeling'
		},
		ratings: {
			'ratings.repetitive-reverse-voltage': ['', '60', 'Guard-ring design of the die.'],
			'ratings.reverse-voltage': ['', '60', 'Guard-ring design of the die.'],
			'ratings.forward-current': ['', '2', 'Die area and lead frame.'],
			'ratings.surge-current': ['', '40', 'Die area.'],
			'ratings.junction-temperature': ['-55', '150', 'Mould compound and barrier metal.'],
			'ratings.storage-temperature': ['-55', '150', 'Mould compound.']
		},
		struckOut: {}
	}
];

/** Opens and fills the demo's drafts. One that is there already is left as people left it. */
export async function seedDrafts(stores: Stores, people: DemoPeople): Promise<void> {
	const [policy] = await listPolicies(stores.db);
	if (policy === undefined) throw new Error('there is no limit policy');
	for (const draft of DEMO_DRAFTS) await seedDraft(stores, draft, people, policy.id);
}

async function seedDraft(
	stores: Stores,
	{ partNumber, template, status, texts, ratings, struckOut }: DemoDraft,
	people: DemoPeople,
	policyVersion: number
): Promise<void> {
	const product = await findProductByPartNumber(stores.db, partNumber);
	if (product !== undefined && (await findDraftId(stores.db, product.id)) !== undefined) return;
	const engineer = { partNumber, by: people.product };
	must(await openDraft(stores, { ...engineer, template, policyVersion, status }), 'opened');
	must(await bindEverything(stores, engineer), 'bound');
	for (const [slot, [minimum, maximum, reason]] of Object.entries(ratings)) {
		must(await setRating(stores, { ...engineer, slot, minimum, maximum, reason }), 'set');
	}
	for (const [place, reason] of Object.entries(struckOut)) {
		must(await strikeOut(stores, { ...engineer, place, reason }), 'struck out');
	}
	const writer = { partNumber, by: people.marketing };
	for (const [block, text] of Object.entries(texts)) {
		must(await writeText(stores, { ...writer, block, text, rowVersion: 0 }), 'written');
	}
}
