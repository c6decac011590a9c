import { MEANING_NAMES } from '../measurements/columns';
import type { ColumnMeaning } from '../measurements/columns';

const count = (size: number, one: string, many = `${one}s`) =>
	`${size.toLocaleString('en')} ${size === 1 ? one : many}`;

/** The bias of a reading is its reverse voltage. */
const conditionName = (meaning: ColumnMeaning) =>
	meaning === 'bias' ? 'reverse voltage' : MEANING_NAMES[meaning];

const outlying = (what: string, z: number, lot: string) =>
	`${what} lies ${Math.abs(z) >= 100 ? 'more than 100' : Math.abs(z).toFixed(1)} robust standard deviations ${z < 0 ? 'below' : 'above'} lot ${lot}`;

export const measurementMessages = {
	// The file as a whole
	emptyFile: () => 'The file is empty.',
	noBody: () => 'No file came. Send its bytes as the body, with a Content-Type such as text/csv.',
	notText: () => 'This isn’t a text file. Save the measurements as CSV and upload that.',
	utf16: () => 'The file is written in UTF-16. Save it as UTF-8 and upload it again.',
	notATable: () =>
		'No table was found: lines with the same number of fields, some of them numbers, separated by comma, semicolon, bar or tab.',
	noDataLines: () => 'No line with a reading was found below the column names.',
	tooManyBiases: (limit: number, temperature: number) =>
		`There are more than ${limit} different biases at ${temperature} °C. Sweeps are compared at equal biases: give the set values, not the measured ones.`,
	tooManyConditions: (limit: number) =>
		`There are more than ${limit} different temperatures and frequencies. Sweeps are compared at equal ones: give the set values, not the measured ones.`,
	fileTooLarge: (limit: number) =>
		`The file is larger than ${Math.round(limit / 1e6).toLocaleString('en')} MB, the most this server takes.`,
	fileNameMissing: () => 'Say the file’s name: …/measurement-sets?filename=lot-a.csv',
	duplicate: (fileName: string, partNumber: string, at: string) =>
		`This file was uploaded before, as ${fileName} of ${partNumber} on ${at.slice(0, 10)}. Its readings count once.`,
	reading: () => 'Reading the file',
	judging: () => 'Looking for suspect sweeps',
	judgingReadings: () => 'Looking for suspect readings',
	storing: () => 'Storing the sweeps',
	storingReadings: () => 'Storing the readings',
	uploadNotFound: (id: number) => `There is no upload ${id}.`,
	setNotFound: (id: number) => `There is no measurement set ${id}.`,
	notReadYet: () => 'The file is still being read. Its columns can be mapped when that is done.',
	cannotBeRead: () =>
		'The file could not be read as a table, so there are no columns to map. Upload it again in another form.',
	alreadyAccepted: () => 'This upload was accepted; its measurement set is there.',
	alreadyImporting: () => 'This upload is being imported.',

	// The mapping
	notAMapping: () => 'The body isn’t a mapping; `errors` says where.',
	columnMissing: (meaning: ColumnMeaning) => `No column is the ${MEANING_NAMES[meaning]}.`,
	nothingMeasured: () =>
		'No column is what was measured: a capacitance, a current, or the value of a reading.',
	contentTwice: () =>
		'A file holds one thing: choose the capacitance, the current, or the value of readings.',
	unitTwice: (header: string) =>
		`A column states the unit of each value; leave the unit of “${header}” open.`,
	columnTwice: (meaning: ColumnMeaning) =>
		`Two columns are the ${MEANING_NAMES[meaning]}; choose one.`,
	unitMissing: (header: string) => `Say the unit of “${header}”; nothing is guessed.`,
	temperatureMissing: () =>
		'No column is the temperature. Choose one, or state the temperature of the whole file.',
	frequencyMissing: () =>
		'No column is the frequency. Choose one, or state the frequency of the whole file.',
	biasSignMissing: () => 'Say which sign the file gives a reverse bias.',
	columnUnknown: (header: string) => `The file has no column “${header}”.`,
	mappingIncomplete: (messages: readonly string[]) => messages.join(' '),
	waferLotLines: () => 'Write one lot a line, as “lot = wafer lot”.',
	setupNumber: (
		field:
			'signalLevelMillivolts' | 'frequencyMegahertz' | 'temperatureCelsius' | 'uncertaintyPercent'
	) =>
		({
			signalLevelMillivolts: 'The signal level is a number above 0, in mV.',
			frequencyMegahertz: 'The frequency is a number above 0, in MHz.',
			temperatureCelsius: 'The temperature is a number in °C, not below absolute zero.',
			uncertaintyPercent: 'The uncertainty is a number from 0 to below 100, in %.'
		})[field],
	formFileLimit: (limit: number) => `Without JavaScript a file may have at most ${limit / 1e6} MB.`,
	chooseFile: () => 'Choose a file first.',
	waferLotDiffers: (lot: string, stored: string, stated: string) =>
		`Lot ${lot} is known to come from wafer lot ${stored}; this upload says ${stated}.`,
	waferLotTwice: (lot: string, first: string, second: string) =>
		`Lot ${lot} is said to come from two wafer lots, ${first} and ${second}.`,

	// Lines
	quoteNotClosed: () => 'A quotation mark doesn’t end in the line.',
	fieldCount: (expected: number, actual: number) =>
		`Expected ${count(expected, 'field')}, got ${actual}.`,
	notANumber: (meaning: ColumnMeaning, read: string) =>
		read === ''
			? `The ${MEANING_NAMES[meaning]} is empty.`
			: `The ${MEANING_NAMES[meaning]} “${read}” isn’t a number.`,
	nameEmpty: (meaning: ColumnMeaning) => `The ${MEANING_NAMES[meaning]} is empty.`,
	badBytes: () => 'A name holds bytes that aren’t text in the file’s encoding.',
	capacitanceNotPositive: (read: string) =>
		`The capacitance “${read}” isn’t above zero, and its logarithm is needed.`,
	capacitanceOverflow: (read: string) =>
		`The capacitance “${read}” is a farad or more, which is how testers mark a reading they couldn’t take.`,
	currentOverflow: (read: string) =>
		`The current “${read}” is a million amperes or more, which is how testers mark a reading they couldn’t take.`,
	temperatureBelowZero: (read: string) => `The temperature “${read}” is below absolute zero.`,
	frequencyNotPositive: (read: string) => `The frequency “${read}” isn’t above zero.`,
	characteristicUnknown: (read: string) =>
		`“${read}” is no characteristic that readings give; write a symbol such as V_F, I_R or V_(BR).`,
	characteristicSwept: (key: string) =>
		`${key} is measured in sweeps along the bias; upload those as a file of sweeps.`,
	characteristicDerived: (key: string) =>
		`${key} is computed from the readings of each device; upload those instead.`,
	unitEmpty: () => 'The unit is empty; nothing is guessed.',
	unitForeign: (key: string, read: string) => `“${read}” is no unit of ${key}.`,
	unitDiffers: (key: string, before: string, now: string) =>
		`${key} was given in ${before} at this condition before, and in ${now} here. Write one unit.`,
	conditionForeign: (key: string, meaning: ColumnMeaning) =>
		`${key} is not measured at a ${conditionName(meaning)}; leave the field empty.`,
	conditionMissing: (key: string, meaning: ColumnMeaning) =>
		`${key} needs the ${conditionName(meaning)} it was measured at.`,
	conditionNotPositive: (meaning: ColumnMeaning, read: string) =>
		meaning === 'bias'
			? `The bias voltage “${read}” is a forward one; readings are taken in reverse.`
			: `The ${MEANING_NAMES[meaning]} “${read}” isn’t above zero.`,
	flagUnknown: (read: string) =>
		`The censor flag “${read}” is none; write <, <=, > or >=, or leave it empty.`,
	flagsDiffer: (value: string, flag: string) =>
		`The value “${value}” and the censor flag “${flag}” say opposite things.`,
	readingZero: (key: string) =>
		`${key} is 0, and its logarithm is needed. Where the tester can’t tell less than its floor, write the floor with a “<”.`,
	readingNegative: (key: string, read: string) =>
		`${key} “${read}” is below zero; readings are written without the sign of their direction.`,
	readingOverflow: (key: string, read: string) =>
		`${key} “${read}” is beyond any diode, which is how testers mark a reading they couldn’t take.`,
	boundsContradict: (key: string, device: string) =>
		`${key} of ${device} was said to be at most one value and at least another at this condition.`,
	tooManySeries: (limit: number) =>
		`There are more than ${limit} different characteristics and conditions. Readings are compared at equal conditions: give the set values, not the measured ones.`,
	tooManyRepeats: (limit: number, key: string) =>
		`A device has more than ${limit} readings of ${key} at one condition.`,
	linesRefused: (total: number) =>
		`${count(total, 'line')} can’t be used. Correct the file or the mapping, or leave these lines out.`,
	skipCountDiffers: (agreed: number, total: number) =>
		`You agreed to leave out ${count(agreed, 'line')}; ${count(total, 'line')} can’t be used.`,

	// Suspects and verdicts
	outlier: (of: {
		what: string;
		z: number;
		bias: number;
		beyond: number;
		biases: number;
		lot: string;
	}) =>
		`${outlying(of.what, of.z, of.lot)} at ${of.bias} V; beyond 6 at ${of.beyond} of ${of.biases} biases.`,
	readingOutlier: (of: { what: string; z: number; lot: string; at: string }) =>
		`${outlying(of.what, of.z, of.lot)} at ${of.at}.`,
	rises: (from: number, to: number, percent: number, times: number) =>
		`Capacitance rises by ${percent.toPrecision(2)} % from ${from} V to ${to} V${Number.isFinite(times) ? `, ${times.toFixed(0)} times the repeatability` : ''}.`,
	suspectsWait: (open: number, all: number, what: 'sweep' | 'reading') =>
		`${count(open, what)}${open === all ? '' : ` of ${all}`} ${open === 1 ? 'waits' : 'wait'} for a verdict.`,
	notSuspect: () => 'This isn’t in quarantine, so there is nothing to decide.',
	setNotAccepted: () => 'This measurement set isn’t accepted.',
	reasonNeeded: () => 'Say why, so that the next person can judge it.',
	verdictUnchanged: (decision: 'keep' | 'exclude') =>
		`It is already ${decision === 'keep' ? 'kept' : 'excluded'}.`
};
