import { expect, it } from 'vitest';
import { logNormalLowerTail, normalHazard } from './logNormalTail';

// mpmath 1.3.0 at 60 digits: log(erfc(-z/√2)/2), and npdf(z) divided by it
it.each([
	[2, -0.0230129093289635, 0.05524786267899],
	[0, -0.693147180559945, 0.797884560802865],
	[-1.5, -2.70594440082389, 1.93867716662254],
	[-10, -53.2312851505125, 10.0980932339625],
	[-36.9, -685.332883165351, 36.927060610171],
	[-37.1, -692.738280715623, 37.1269151534994],
	[-60, -1805.01356068057, 60.0166574202411],
	[-1000, -500007.826694812, 1000.000999998]
])('at %f has the logarithm and the slope mpmath gives, to 1 part in 10¹⁰', (z, log, slope) => {
	expect(logNormalLowerTail(z) / log).toBeCloseTo(1, 10);
	expect(normalHazard(z) / slope).toBeCloseTo(1, 10);
});
