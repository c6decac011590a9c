import { expect, it } from 'vitest';
import { detailsText } from './detailsText';

const hash = 'b4f71c4a062b654bb81f19c970dbbe11378d55605436f3264fbc8fc379922587';

it.each<[unknown, string]>([
	[{}, ''],
	[{ row: 'capacitance.25c.VR=15' }, 'row capacitance.25c.VR=15'],
	[{ sha256: hash, rows: 24 }, 'sha256 b4f71c4a062b…, rows 24'],
	[{ files: { 'datasheet.pdf': hash } }, 'files datasheet.pdf b4f71c4a062b…'],
	[{ roles: ['marketing', 'reader'], isActive: false }, 'roles marketing, reader, isActive false'],
	[{ previous: null }, 'previous –']
])('says %j as “%s”', (details, text) => {
	expect(detailsText(details)).toBe(text);
});
