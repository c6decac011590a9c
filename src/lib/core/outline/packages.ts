import type { Dimension, LandDimension, PackageOutline } from './packageOutline';

type Row = readonly [
	quantity: string,
	subscript: string,
	name: string,
	minimum: string,
	nominal: string,
	maximum: string
];

const dimensions = (rows: readonly Row[]): Dimension[] =>
	rows.map(([quantity, subscript, name, minimum, nominal, maximum]) => ({
		symbol: subscript === '' ? { quantity } : { quantity, subscript },
		name,
		minimum,
		nominal,
		maximum
	}));

const land = (rows: readonly (readonly [string, string, string])[]): LandDimension[] =>
	rows.map(([quantity, name, nominal]) => ({ symbol: { quantity }, name, nominal }));

const twoPads = (sizes: readonly [Z: string, G: string, X: string, Y: string]) =>
	land([
		['Z', 'outer distance', sizes[0]],
		['G', 'gap', sizes[1]],
		['X', 'pad width', sizes[2]],
		['Y', 'pad length', sizes[3]]
	]);

/**
 * Packages whose outlines are public registrations. The numbers are FROM MEMORY of such outlines and
 * of usual land patterns: no registration was at hand. Check them against the registration before a
 * datasheet is published.
 */
export const PACKAGES: readonly PackageOutline[] = [
	{
		name: 'SOD-123',
		shape: 'gull-two',
		source: 'registered outline SOD-123; dimensions and land pattern from memory',
		dimensions: dimensions([
			['A', '', 'height', '0.94', '1.17', '1.35'],
			['A', '1', 'stand-off', '0', '0.05', '0.10'],
			['b', '', 'lead width', '0.51', '0.61', '0.71'],
			['c', '', 'lead thickness', '0.09', '0.12', '0.15'],
			['D', '', 'body length', '2.54', '2.69', '2.84'],
			['E', '', 'body width', '1.40', '1.60', '1.80'],
			['H', 'E', 'length over leads', '3.56', '3.68', '3.86'],
			['L', 'p', 'foot length', '0.25', '0.40', '0.55']
		]),
		land: twoPads(['4.18', '2.36', '1.22', '0.91'])
	},
	{
		name: 'SOD-323',
		shape: 'gull-two',
		source: 'registered outline SOD-323; dimensions and land pattern from memory',
		dimensions: dimensions([
			['A', '', 'height', '0.80', '0.90', '1.00'],
			['A', '1', 'stand-off', '0', '0.05', '0.10'],
			['b', '', 'lead width', '0.25', '0.32', '0.40'],
			['c', '', 'lead thickness', '0.09', '0.12', '0.18'],
			['D', '', 'body length', '1.60', '1.70', '1.80'],
			['E', '', 'body width', '1.15', '1.25', '1.35'],
			['H', 'E', 'length over leads', '2.30', '2.50', '2.70'],
			['L', 'p', 'foot length', '0.20', '0.30', '0.40']
		]),
		land: twoPads(['2.86', '1.60', '0.83', '0.63'])
	},
	{
		name: 'SOT-23',
		shape: 'gull-three',
		source: 'registered outline TO-236; dimensions and land pattern from memory',
		dimensions: dimensions([
			['A', '', 'height', '0.89', '1.00', '1.12'],
			['A', '1', 'stand-off', '0.01', '0.06', '0.10'],
			['b', '', 'lead width', '0.37', '0.44', '0.50'],
			['c', '', 'lead thickness', '0.08', '0.14', '0.20'],
			['D', '', 'body length', '2.80', '2.90', '3.04'],
			['E', '', 'body width', '1.20', '1.30', '1.40'],
			['e', '1', 'pitch of leads 1 and 2', '1.78', '1.90', '2.04'],
			['H', 'E', 'width over leads', '2.10', '2.40', '2.64'],
			['L', 'p', 'foot length', '0.30', '0.43', '0.55']
		]),
		land: land([
			['C', 'distance of the rows', '2.00'],
			['X', 'pad width', '0.80'],
			['Y', 'pad length', '0.90']
		])
	},
	{
		name: 'DO-214AC',
		shape: 'c-bend',
		source: 'registered outline DO-214, variation AC; dimensions and land pattern from memory',
		dimensions: dimensions([
			['A', '', 'height', '1.97', '2.10', '2.29'],
			['A', '1', 'stand-off', '0.05', '0.10', '0.20'],
			['b', '', 'lead width', '1.27', '1.45', '1.63'],
			['c', '', 'lead thickness', '0.15', '0.28', '0.41'],
			['D', '', 'body length', '4.06', '4.32', '4.57'],
			['E', '', 'body width', '2.29', '2.60', '2.92'],
			['H', 'E', 'length over leads', '4.83', '5.21', '5.59'],
			['L', 'p', 'foot length', '0.76', '1.14', '1.52']
		]),
		land: twoPads(['6.00', '2.00', '2.00', '2.00'])
	},
	{
		name: 'DO-214AA',
		shape: 'c-bend',
		source: 'registered outline DO-214, variation AA; dimensions and land pattern from memory',
		dimensions: dimensions([
			['A', '', 'height', '1.95', '2.30', '2.47'],
			['A', '1', 'stand-off', '0.05', '0.10', '0.20'],
			['b', '', 'lead width', '1.96', '2.03', '2.20'],
			['c', '', 'lead thickness', '0.15', '0.23', '0.31'],
			['D', '', 'body length', '4.06', '4.32', '4.60'],
			['E', '', 'body width', '3.30', '3.56', '3.95'],
			['H', 'E', 'length over leads', '5.21', '5.44', '5.60'],
			['L', 'p', 'foot length', '0.76', '1.02', '1.60']
		]),
		land: twoPads(['6.58', '2.26', '2.74', '2.16'])
	},
	{
		name: '0402',
		shape: 'chip',
		source: 'two-terminal chip of size 0402 (1005 metric); dimensions and land pattern from memory',
		dimensions: dimensions([
			['A', '', 'height', '0.30', '0.35', '0.40'],
			['D', '', 'length', '0.95', '1.00', '1.05'],
			['E', '', 'width', '0.45', '0.50', '0.55'],
			['L', '', 'terminal length', '0.15', '0.25', '0.35']
		]),
		land: twoPads(['1.50', '0.40', '0.60', '0.55'])
	}
];

/** The package of this name, or `undefined` where its outline isn't known. */
export function findPackage(name: string): PackageOutline | undefined {
	return PACKAGES.find((known) => known.name === name.trim().toUpperCase());
}
