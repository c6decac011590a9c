import { versionText } from '$lib/core/datasheet/record';
import type { Database } from '../db/database';
import { findDie } from '../db/findDie';
import { findProduct } from '../db/findProduct';
import { listProductRows, type ProductRow } from './productTable';

/** A product as the API lists it; units stand in the names. */
export function productSummary(row: ProductRow) {
	const { release, openRevision, draft } = row.datasheet;
	return {
		partNumber: row.partNumber,
		productClass: row.productClass,
		className: row.className,
		description: row.description,
		package: row.package,
		elements: row.elements,
		die: row.dieName,
		independentLots: row.lots,
		temperaturesCelsius: row.temperaturesCelsius,
		datasheet: {
			release: release && { version: versionText(release), state: release.state },
			openRevision,
			draftStatus: draft
		}
	};
}

/** A product with what its die is and how it is ordered, or `undefined`. */
export async function describeProduct(db: Database, partNumber: string, today: string) {
	const product = await findProduct(db, partNumber);
	if (product === undefined) return undefined;
	const row = (await listProductRows(db, today)).find((other) => other.partNumber === partNumber);
	const die = await findDie(db, product.die);
	if (row === undefined || die === undefined) return undefined;
	const { area, material, conductivity, junction } = die.facts;
	return {
		...productSummary(row),
		die: {
			name: die.name,
			areaSquareMetres: area,
			junction,
			conductivity,
			material: {
				name: material.name,
				relativePermittivity: material.relativePermittivity,
				conductionStatesPerCubicMetre: material.conductionStates,
				valenceStatesPerCubicMetre: material.valenceStates,
				source: material.source
			}
		},
		orderingCodes: product.orderingCodes.map(({ quantity, ...code }) => ({
			...code,
			devicesPerPack: quantity
		}))
	};
}
