/** Row stride of the matrices here: none is larger than 4 × 4. */
const STRIDE = 4;

/**
 * Solves a symmetric positive system in place by Cholesky's method; the solution replaces the right
 * side. A pivot that rounding has made negative is lifted, so that a damped step always exists.
 */
export function solve(matrix: Float64Array, right: Float64Array, size: number): void {
	for (let j = 0; j < size; j++) {
		let pivot = matrix[j * STRIDE + j]!;
		for (let k = 0; k < j; k++) pivot -= matrix[j * STRIDE + k]! ** 2;
		const root = Math.sqrt(Math.max(pivot, Number.MIN_VALUE));
		matrix[j * STRIDE + j] = root;
		for (let i = j + 1; i < size; i++) {
			let sum = matrix[i * STRIDE + j]!;
			for (let k = 0; k < j; k++) sum -= matrix[i * STRIDE + k]! * matrix[j * STRIDE + k]!;
			matrix[i * STRIDE + j] = sum / root;
		}
	}
	for (let i = 0; i < size; i++) {
		let sum = right[i]!;
		for (let k = 0; k < i; k++) sum -= matrix[i * STRIDE + k]! * right[k]!;
		right[i] = sum / matrix[i * STRIDE + i]!;
	}
	for (let i = size - 1; i >= 0; i--) {
		let sum = right[i]!;
		for (let k = i + 1; k < size; k++) sum -= matrix[k * STRIDE + i]! * right[k]!;
		right[i] = sum / matrix[i * STRIDE + i]!;
	}
}

/**
 * Inverts a symmetric positive matrix in place (Gauss–Jordan, no pivoting). False, and the matrix
 * spoilt, when a pivot falls below the threshold.
 */
export function invert(matrix: Float64Array, size: number, threshold: number): boolean {
	for (let k = 0; k < size; k++) {
		const pivot = matrix[k * STRIDE + k]!;
		if (!(pivot > threshold)) return false;
		matrix[k * STRIDE + k] = 1;
		for (let j = 0; j < size; j++) matrix[k * STRIDE + j]! /= pivot;
		for (let i = 0; i < size; i++) {
			if (i === k) continue;
			const factor = matrix[i * STRIDE + k]!;
			matrix[i * STRIDE + k] = 0;
			for (let j = 0; j < size; j++) matrix[i * STRIDE + j]! -= factor * matrix[k * STRIDE + j]!;
		}
	}
	return true;
}
