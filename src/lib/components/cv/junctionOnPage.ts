import type { SweepFits } from '$lib/core/distributions/sweepFits';
import type { DieFacts } from '$lib/core/junction/dieFacts';
import type { MedianJunction, Sweep } from '$lib/core/junction/medianJunction';
import { inEngineeringUnits } from '$lib/core/units/engineering';
import type { JunctionData, NamedSweep } from './windowLine';

/** What the server knows of the junction below a curve. */
interface Known {
	readonly sweep: Sweep;
	readonly median: MedianJunction | undefined;
	readonly die: { readonly facts: DieFacts } | undefined;
	readonly settings: JunctionData['settings'] | undefined;
	readonly fits:
		| { readonly status: 'ready'; readonly fits: SweepFits }
		| { readonly status: 'underway' | 'none' }
		| { readonly status: 'failed'; readonly why: string };
}

/** The same as the page carries it: sums and medians to eight digits, no device but the worst. */
export function junctionOnPage({ sweep, median, die, settings, fits }: Known) {
	const known = fits.status === 'ready' ? fits.fits : undefined;
	return {
		fits: { status: fits.status, why: fits.status === 'failed' ? fits.why : '' },
		summary: known === undefined ? null : withoutSweeps(known),
		isDonors: die?.facts.conductivity !== 'p',
		hasDie: die !== undefined,
		charge: median?.charge ? chargeInWords(median.charge) : null,
		hasModel: median !== undefined,
		warnings: median?.warnings ?? [],
		data:
			median === undefined || settings === undefined
				? null
				: ({
						median: rounded({ name: 'median', ...sweep }),
						lots: known === undefined ? [] : lotSweeps(known),
						caseCapacitance: median.fit.model.caseCapacitance,
						settings
					} satisfies JunctionData)
	};
}

function withoutSweeps({ devices, parameters, worst, ...of }: SweepFits) {
	const { tooFewReadings, notIdentifiable, notConverged } = of;
	return { devices, parameters, worst, tooFewReadings, notIdentifiable, notConverged };
}

function lotSweeps({ biases, lots }: SweepFits): NamedSweep[] {
	return lots.map(({ name, capacitances }) => {
		const measured = biases.flatMap((bias, i) => {
			const capacitance = capacitances[i] ?? null;
			return capacitance === null ? [] : [{ bias, capacitance }];
		});
		return rounded({
			name,
			biases: measured.map(({ bias }) => bias),
			capacitances: measured.map(({ capacitance }) => capacitance)
		});
	});
}

function rounded({ name, biases, capacitances }: NamedSweep): NamedSweep {
	return { name, biases, capacitances: capacitances.map((value) => Number(value.toPrecision(8))) };
}

function chargeInWords({ bias, charge, energy }: NonNullable<MedianJunction['charge']>) {
	return {
		bias,
		charge: inEngineeringUnits(charge, 'C', 4),
		energy: inEngineeringUnits(energy, 'J', 3)
	};
}
