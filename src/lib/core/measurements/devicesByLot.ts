/** The devices of each lot, by index, from the lot of each device. */
export function devicesByLot(lots: readonly string[]): Map<string, number[]> {
	const members = new Map<string, number[]>();
	for (const [device, lot] of lots.entries()) {
		const known = members.get(lot);
		if (known === undefined) members.set(lot, [device]);
		else known.push(device);
	}
	return members;
}
