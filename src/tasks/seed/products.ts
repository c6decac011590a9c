import type { DieFacts } from '$lib/core/junction/dieFacts';
import { MATERIAL_PRESETS } from '$lib/core/junction/material';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { saveDie } from '$lib/server/services/saveDie';
import { saveProduct } from '$lib/server/services/saveProduct';
import type { ProductFacts } from '$lib/server/services/saveProduct';
import type { Stores } from '$lib/server/work/stores';
import { must } from './must';

interface DemoProduct {
	readonly die: { readonly name: string; readonly facts: Omit<DieFacts, 'material'> };
	readonly product: Omit<ProductFacts, 'die'>;
}

const PRODUCTS: readonly DemoProduct[] = [
	{
		die: {
			name: 'T113',
			facts: { area: 0.09e-6, conductivity: 'n', junction: 'p-n' }
		},
		product: {
			partNumber: 'LKT-1130',
			elements: 1,
			productClass: 'tuning',
			package: 'SOD-323',
			description:
				'Hyperabrupt silicon variable-capacitance diode, 30 V, in a surface-mount package with two leads',
			orderingCodes: [
				{
					code: 'LKT-1130-R7',
					grade: 'standard',
					marking: 'K4',
					packing: 'reel 180 mm, tape 8 mm',
					quantity: 3000
				},
				{
					code: 'LKT-1130-R13',
					grade: 'standard',
					marking: 'K4',
					packing: 'reel 330 mm, tape 8 mm',
					quantity: 10_000
				}
			]
		}
	},
	{
		die: {
			name: 'S240',
			facts: { area: 1.44e-6, conductivity: 'n', junction: 'metal-semiconductor' }
		},
		product: {
			partNumber: 'LKR-2406',
			elements: 1,
			productClass: 'rectifier',
			package: 'DO-214AC',
			description: 'Schottky rectifier, 60 V, 2 A, in a surface-mount package with two leads',
			orderingCodes: [
				{
					code: 'LKR-2406-R13',
					grade: 'standard',
					marking: 'R46',
					packing: 'reel 330 mm, tape 12 mm',
					quantity: 7500
				}
			]
		}
	}
];

/** Creates the demo's dies and products. */
export async function seedProducts(stores: Stores, by: string): Promise<void> {
	for (const { die, product } of PRODUCTS) {
		if (await findProductByPartNumber(stores.db, product.partNumber)) continue;
		const { id } = must(
			await saveDie(stores, {
				id: null,
				rowVersion: 0,
				name: die.name,
				facts: { ...die.facts, material: MATERIAL_PRESETS.si },
				by
			}),
			'saved'
		);
		must(
			await saveProduct(stores, { ...product, die: id, isNew: true, rowVersion: 0, by }),
			'saved'
		);
	}
}
