import { expect, it } from 'vitest';
import { depletionWidth, dopingProfile } from './dopingProfile';

const SETTINGS = { area: 1e-7, relativePermittivity: 11.7 };
const PERMITTIVITY = 11.7 * 8.8541878188e-12;

it('has the width of a plate capacitor', () => {
	expect(depletionWidth(1e-11, SETTINGS)).toBeCloseTo((PERMITTIVITY * 1e-7) / 1e-11, 18);
});

// Closed form: N(x) = 4e21 (1 + 3 exp(−x/0.6 µm)) depletes to W at (q/ε) ∫ x N dx
it('returns a known profile', () => {
	const [surface, decay] = [4e21, 0.6e-6];
	const bending = (w: number) =>
		(1.602176634e-19 / PERMITTIVITY) *
		surface *
		((w * w) / 2 + 3 * decay * (decay - (decay + w) * Math.exp(-w / decay)));
	const widths = Array.from({ length: 60 }, (_, i) => 0.3e-6 + i * 0.01e-6);
	const profile = dopingProfile(
		widths.map(bending),
		widths.map((w) => (PERMITTIVITY * 1e-7) / w),
		SETTINGS
	);
	expect(profile).toHaveLength(59);
	for (const { depth, concentration } of profile) {
		const truth = surface * (1 + 3 * Math.exp(-depth / decay));
		expect(concentration / truth).toBeCloseTo(1, 3);
	}
});

it('leaves out where 1/C² does not rise, and readings that are absent', () => {
	const readings = [4e-12, 3e-12, 3.1e-12, NaN, 2.5e-12];
	expect(dopingProfile([0, 1, 2, 3, 4], readings, SETTINGS)).toHaveLength(2);
	expect(dopingProfile([0, 1], [4e-12, 3e-12], SETTINGS, 3e-12)).toEqual([]);
});
