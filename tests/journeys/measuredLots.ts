/** Capacitance of one device at each bias, in pF, as the file states it. */
export interface MeasuredDevice {
	readonly lot: string;
	readonly wafer: string;
	readonly name: string;
	readonly capacitances: readonly number[];
}

export const BIASES = [0.5, 1, 2, 3, 4, 6, 8, 10, 12, 15, 18, 20, 22, 25, 28] as const;

const LOTS = [
	{ name: 'LK26-101', shift: -0.006 },
	{ name: 'LK26-102', shift: 0.001 },
	{ name: 'LK26-103', shift: 0.005 }
];
const WAFERS = ['02', '05', '11', '17'];
const DEVICES = 5;

/** Evenly spread over −1 … 1 and in no order: a golden-ratio sequence. */
const spread = (index: number) => 2 * ((index * 0.618_033_988_75) % 1) - 1;

/** 3 lots × 4 wafers × 5 devices of an invented tuning diode. */
export function measuredLots(): MeasuredDevice[] {
	return LOTS.flatMap(({ name: lot, shift }, lotIndex) =>
		WAFERS.flatMap((wafer, waferIndex) =>
			Array.from({ length: DEVICES }, (_, deviceIndex) => {
				const index = (lotIndex * WAFERS.length + waferIndex) * DEVICES + deviceIndex + 1;
				const scale = Math.exp(shift + 0.024 * spread(index));
				const exponent = 1.12 + 0.004 * spread(index * 7);
				return {
					lot,
					wafer,
					name: `D${deviceIndex + 1}`,
					capacitances: BIASES.map((bias) =>
						Number((0.1 + scale * 36 * (1 + bias / 2.1) ** -exponent).toFixed(3))
					)
				};
			})
		)
	);
}

/** The devices as a file a tester might write. */
export function csvOf(devices: readonly MeasuredDevice[]): string {
	const head = 'Lot,Wafer,Device,Temperature (°C),Frequency (MHz),Bias (V),Capacitance (pF)';
	const lines = devices.flatMap(({ lot, wafer, name, capacitances }) =>
		capacitances.map((value, index) =>
			[lot, wafer, name, 25, 1, BIASES[index], value.toFixed(3)].join(',')
		)
	);
	return `${[head, ...lines].join('\n')}\n`;
}

/** The same devices, but for one number of one of them. */
export function withOneNumberChanged(
	devices: readonly MeasuredDevice[],
	{
		device,
		bias,
		factor
	}: { readonly device: number; readonly bias: number; readonly factor: number }
): MeasuredDevice[] {
	const column = BIASES.findIndex((one) => one === bias);
	return devices.map((entry, index) =>
		index === device
			? {
					...entry,
					capacitances: entry.capacitances.map((value, place) =>
						place === column ? Number((value * factor).toFixed(3)) : value
					)
				}
			: entry
	);
}
