import type { SetCounts } from '$lib/core/measurements/counts';
import type { MeasurementSetup } from '$lib/core/measurements/setup';
import { inEngineeringUnits } from '$lib/core/units/engineering';
import { inUnit } from '$lib/core/units/unit';
import { frequencyText, instantText, manyText, sizeText, withUnit } from './words';

interface DescribedSet {
	readonly fileName: string;
	readonly byteSize: number;
	readonly sha256: string;
	readonly setup: MeasurementSetup;
	readonly counts: SetCounts;
	readonly acceptedAt: string;
	readonly acceptedByName: string;
}

/** Relative as percent, without the error a product would have. */
const percent = (share: number) => withUnit(inUnit(share, 0.01), '%');

/** What a set's page says of its file and set-up, as terms and texts. */
export function setupItems(set: DescribedSet): { term: string; text: string }[] {
	const { setup, counts } = set;
	const { repeatability } = counts;
	return [
		{ term: 'File', text: `${set.fileName}, ${sizeText(set.byteSize)}` },
		{ term: 'SHA-256', text: set.sha256 },
		{ term: 'Accepted', text: `${instantText(set.acceptedAt)}, ${set.acceptedByName}` },
		...said('Instrument', setup.instrument),
		...said(
			'Signal level',
			setup.signalLevelVolts && `${inEngineeringUnits(setup.signalLevelVolts, 'V', 2)} rms`
		),
		...said('Frequency', setup.frequencyHertz && frequencyText(setup.frequencyHertz)),
		...said(
			'Temperature',
			setup.temperatureCelsius === null ? '' : withUnit(setup.temperatureCelsius, '°C')
		),
		{
			term: 'Stated uncertainty',
			text: setup.uncertainty === null ? 'not stated' : percent(setup.uncertainty)
		},
		...said(
			'Repeatability',
			repeatability &&
				`${percent(Number(repeatability.standardDeviation.toPrecision(2)))} of a reading, from ${manyText(repeatability.degreesOfFreedom)} repeats`
		),
		...said(
			'Left out',
			counts.skippedLines > 0 && `${manyText(counts.skippedLines)} lines that could not be used`
		),
		...said('Comments', counts.comments > 0 && `${manyText(counts.comments)} comment lines`),
		...said('Note', setup.note)
	];
}

function said(term: string, text: string | number | false | null) {
	return typeof text === 'string' && text !== '' ? [{ term, text }] : [];
}
