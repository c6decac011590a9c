export type Vector = readonly [number, number, number];
export type Matrix = readonly [Vector, Vector, Vector];

/** The connection space's white, to the digits the format asks for (ICC.1:2004-10, 7.2.16). */
export const D50: Vector = [0.9642, 1, 0.8249];

/** Chromaticities of the primaries and of the white D65 (IEC 61966-2-1, table 1). */
const RED = [0.64, 0.33] as const;
const GREEN = [0.3, 0.6] as const;
const BLUE = [0.15, 0.06] as const;
const D65 = [0.3127, 0.329] as const;

/** Response of the eye's cones after Bradford (ICC.1:2004-10, annex E). */
const BRADFORD: Matrix = [
	[0.8951, 0.2664, -0.1614],
	[-0.7502, 1.7135, 0.0367],
	[0.0389, -0.0685, 1.0296]
];

/** Tristimulus values of a chromaticity at luminance 1. */
const tristimulus = ([x, y]: readonly [number, number]): Vector => [x / y, 1, (1 - x - y) / y];

const dot = (a: Vector, b: Vector) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

const transposed = ([a, b, c]: Matrix): Matrix => [
	[a[0], b[0], c[0]],
	[a[1], b[1], c[1]],
	[a[2], b[2], c[2]]
];

const apply = (matrix: Matrix, vector: Vector): Vector => [
	dot(matrix[0], vector),
	dot(matrix[1], vector),
	dot(matrix[2], vector)
];

function multiply(left: Matrix, right: Matrix): Matrix {
	const [a, b, c] = transposed(right);
	return transposed([apply(left, a), apply(left, b), apply(left, c)]);
}

const cross = (a: Vector, b: Vector): Vector => [
	a[1] * b[2] - a[2] * b[1],
	a[2] * b[0] - a[0] * b[2],
	a[0] * b[1] - a[1] * b[0]
];

const scaled = (vector: Vector, by: number): Vector => [
	vector[0] * by,
	vector[1] * by,
	vector[2] * by
];

/** The inverse by cofactors: its columns are the cross products of the rows over the determinant. */
function inverse([a, b, c]: Matrix): Matrix {
	const determinant = dot(a, cross(b, c));
	return transposed([
		scaled(cross(b, c), 1 / determinant),
		scaled(cross(c, a), 1 / determinant),
		scaled(cross(a, b), 1 / determinant)
	]);
}

/** From colours under D65 to the same colours under D50. */
export const BRADFORD_D65_TO_D50: Matrix = adaptation(tristimulus(D65), D50);

function adaptation(from: Vector, to: Vector): Matrix {
	const [source, aim] = [apply(BRADFORD, from), apply(BRADFORD, to)];
	const gains: Matrix = [
		[aim[0] / source[0], 0, 0],
		[0, aim[1] / source[1], 0],
		[0, 0, aim[2] / source[2]]
	];
	return multiply(inverse(BRADFORD), multiply(gains, BRADFORD));
}

/** Red, green and blue as the connection space has them: together they make its white. */
export function adaptedPrimaries(): readonly [Vector, Vector, Vector] {
	const [red, green, blue] = [tristimulus(RED), tristimulus(GREEN), tristimulus(BLUE)];
	const shares = apply(inverse(transposed([red, green, blue])), tristimulus(D65));
	const adapted = (primary: Vector, share: number) =>
		apply(BRADFORD_D65_TO_D50, scaled(primary, share));
	return [adapted(red, shares[0]), adapted(green, shares[1]), adapted(blue, shares[2])];
}
