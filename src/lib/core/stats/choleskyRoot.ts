/** Square of a row of a lower triangle. */
export function rowSquare(root: Float64Array, row: number, points: number): number {
	let sum = 0;
	for (let q = 0; q <= row; q++) sum += root[row * points + q]! ** 2;
	return sum;
}

/** Lower triangular root of a covariance; directions without variance stay zero. */
export function choleskyRoot(matrix: Float64Array, points: number): Float64Array {
	const root = new Float64Array(points * points);
	for (let j = 0; j < points; j++) {
		const pivot = matrix[j * points + j]! - rowSquare(root, j, points);
		const isFlat = pivot <= 1e-12 * Math.abs(matrix[j * points + j]!);
		const diagonal = isFlat ? 0 : Math.sqrt(pivot);
		root[j * points + j] = diagonal;
		for (let i = j + 1; i < points; i++) {
			if (isFlat) continue;
			let sum = matrix[i * points + j]!;
			for (let k = 0; k < j; k++) sum -= root[i * points + k]! * root[j * points + k]!;
			root[i * points + j] = sum / diagonal;
		}
	}
	return root;
}
