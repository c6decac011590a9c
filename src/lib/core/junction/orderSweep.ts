/** A sweep in order of bias. */
export interface OrderedSweep {
	/** Every reading, ordered by bias and by capacitance where a bias is repeated. */
	readonly biases: readonly number[];
	readonly capacitances: readonly number[];
	/** Every bias once, repeats averaged. */
	readonly distinct: {
		readonly biases: readonly number[];
		readonly capacitances: readonly number[];
	};
}

/** Puts a sweep in order, so that the direction it was measured in changes nothing. */
export function orderSweep(
	biases: readonly number[],
	capacitances: readonly number[]
): OrderedSweep {
	const order = biases
		.map((bias, i) => ({ bias, capacitance: capacitances[i]! }))
		.sort((a, b) => a.bias - b.bias || a.capacitance - b.capacitance);
	const distinct: { bias: number; sum: number; count: number }[] = [];
	for (const { bias, capacitance } of order) {
		const last = distinct.at(-1);
		if (last?.bias === bias) {
			last.sum += capacitance;
			last.count++;
		} else distinct.push({ bias, sum: capacitance, count: 1 });
	}
	return {
		biases: order.map(({ bias }) => bias),
		capacitances: order.map(({ capacitance }) => capacitance),
		distinct: {
			biases: distinct.map(({ bias }) => bias),
			capacitances: distinct.map(({ sum, count }) => sum / count)
		}
	};
}
