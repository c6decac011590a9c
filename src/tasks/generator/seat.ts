/** Where a device sits on its wafer, and its name: the same in every file of a lot. */
export function seatOf(device: number): { readonly site: string; readonly name: string } {
	return {
		site: `X${((device - 1) % 5) + 1}Y${Math.floor((device - 1) / 5) + 1}`,
		name: `D${String(device).padStart(3, '0')}`
	};
}
