import type { DeviceColumns } from './blocks';

/** Who a device is, as the file names it. */
export interface DeviceName {
	readonly lot: string;
	readonly wafer: string;
	readonly site: string;
	readonly element: string;
	readonly name: string;
}

const SEPARATOR = '\u001f';

/** The devices of a file in the order in which they come; each has an index. */
export class DeviceList {
	readonly columns: DeviceColumns = { lot: [], wafer: [], site: [], element: [], name: [] };
	readonly #deviceOf = new Map<string, number>();

	/** The index of a device; a new one gets the next. */
	indexOf({ lot, wafer, site, element, name }: DeviceName): number {
		const key = [lot, wafer, site, element, name].join(SEPARATOR);
		const known = this.#deviceOf.get(key);
		if (known !== undefined) return known;
		const index = this.columns.lot.length;
		this.columns.lot.push(lot);
		this.columns.wafer.push(wafer);
		this.columns.site.push(site);
		this.columns.element.push(element);
		this.columns.name.push(name);
		this.#deviceOf.set(key, index);
		return index;
	}

	get count(): number {
		return this.columns.lot.length;
	}
}
