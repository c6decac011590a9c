import { expect, it } from 'vitest';
import { limitationsOf } from './limitations';
import { limitationMessages } from '../messages/limitations';

const sentences = (method: Parameters<typeof limitationsOf>[0]['method'], lotSizes: number[]) =>
	limitationsOf({ method, lotSizes }).map(({ sentence }) => sentence());

it('warns of pooling as soon as there are two lots', () => {
	expect(sentences('normal', [25, 25, 25])).toEqual([limitationMessages.pooledLots()]);
	expect(sentences('order', [240, 240])).toEqual([limitationMessages.pooledLots()]);
	expect(sentences('normal', [75])).toEqual([]);
});

it('warns of very unequal lots, and of no others', () => {
	expect(sentences('lots', [25, 25, 25])).toEqual([]);
	expect(sentences('lots', [50, 20, 5])).toEqual([]);
	expect(sentences('lots', [150, 5, 2])).toEqual([limitationMessages.veryUnequalLots()]);
	expect(sentences('lots', [25, 25, 25, 2])).toEqual([limitationMessages.veryUnequalLots()]);
	expect(sentences('whole curve', [150, 5, 2])).toEqual([limitationMessages.veryUnequalLots()]);
});

it('warns of lots beside a line, and says nothing of a house rule', () => {
	expect(sentences('screened', [25, 25])).toEqual([limitationMessages.lotsBesideTheLine()]);
	expect(sentences('sigma', [150, 5, 2])).toEqual([]);
});
