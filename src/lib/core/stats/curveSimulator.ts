import { coveringHalfWidth } from './coveringHalfWidth';
import { normalQuantile } from './normalQuantile';
import { quantile } from './quantile';
import type { RandomSource } from './randomSource';

/** What is known of a curve: covariance across its points, between lot means and within lots. */
export interface CurveCovariance {
	/** Points × points, row by row: covariance of the lot means, divided by lots − 1. */
	readonly ofLotMeans: Float64Array;
	/** Points × points: covariance of devices within their lot. */
	readonly withinLots: Float64Array;
	readonly points: number;
	readonly lots: number;
	/** Devices a lot, or their harmonic mean. */
	readonly effectiveSize: number;
	/** Degrees of freedom within lots. */
	readonly withinDegrees: number;
}

/** Which side of a band a device must not cross. */
export type BandSides = 'minimum' | 'maximum' | 'both';

/** Draws samples and future devices of a curve, in deviations from its true mean. */
export class CurveSimulator {
	private readonly points: number;
	private readonly lotRoot: Float64Array;
	private readonly withinRoot: Float64Array;
	private readonly betweenRoot: Float64Array;
	private readonly trueDeviation: Float64Array;
	/** Mean and deviation of the drawn sample at each point. */
	private readonly sampleMean: Float64Array;
	private readonly sampleDeviation: Float64Array;
	private readonly triangle: Float64Array;

	constructor(
		private readonly curve: CurveCovariance,
		private readonly normal: RandomSource
	) {
		const { points, ofLotMeans, withinLots, effectiveSize } = curve;
		this.points = points;
		this.lotRoot = choleskyRoot(ofLotMeans, points);
		this.withinRoot = choleskyRoot(withinLots, points);
		/** What is left of the lot means when the devices in them are taken off; not below zero. */
		const between = ofLotMeans.map((value, i) => value - withinLots[i]! / effectiveSize);
		this.betweenRoot = choleskyRoot(between, points);
		this.trueDeviation = new Float64Array(points);
		for (let p = 0; p < points; p++)
			this.trueDeviation[p] = Math.sqrt(
				rowSquare(this.betweenRoot, p, points) + rowSquare(this.withinRoot, p, points)
			);
		this.sampleMean = new Float64Array(points);
		this.sampleDeviation = new Float64Array(points);
		this.triangle = new Float64Array(points * points);
	}

	/** Devices of future lots, one each, row by row. */
	drawDevices(count: number): Float64Array {
		const { points } = this;
		const devices = new Float64Array(count * points);
		const draw = new Float64Array(2 * points);
		for (let d = 0; d < count; d++) {
			for (let i = 0; i < draw.length; i++) draw[i] = this.normal();
			for (let p = 0; p < points; p++) {
				let sum = 0;
				for (let q = 0; q <= p; q++)
					sum +=
						this.betweenRoot[p * points + q]! * draw[q]! +
						this.withinRoot[p * points + q]! * draw[points + q]!;
				devices[d * points + p] = sum;
			}
		}
		return devices;
	}

	/** Mean and deviations that a sample of this design would show. */
	drawSample(): void {
		const { lots, effectiveSize, withinDegrees } = this.curve;
		const scale = 1 / Math.sqrt(lots);
		const draw = Float64Array.from({ length: this.points }, () => this.normal() * scale);
		for (let p = 0; p < this.points; p++) {
			let sum = 0;
			for (let q = 0; q <= p; q++) sum += this.lotRoot[p * this.points + q]! * draw[q]!;
			this.sampleMean[p] = sum;
		}
		this.sampleDeviation.fill(0);
		this.addWishart(this.lotRoot, lots - 1, 1);
		this.addWishart(this.withinRoot, withinDegrees, 1 - 1 / effectiveSize);
		for (let p = 0; p < this.points; p++)
			this.sampleDeviation[p] = Math.sqrt(this.sampleDeviation[p]!);
	}

	/** Adds share · diagonal of (Wishart / degrees): the row squares of root × Bartlett's triangle. */
	private addWishart(root: Float64Array, degrees: number, share: number): void {
		const { points, triangle } = this;
		for (let row = 0; row < points; row++)
			for (let column = 0; column <= row; column++)
				triangle[row * points + column] =
					column >= degrees
						? 0
						: column < row
							? this.normal()
							: Math.sqrt(this.chiSquare(degrees - column));
		for (let p = 0; p < points; p++) {
			let square = 0;
			for (let column = 0; column <= p; column++) {
				let sum = 0;
				for (let row = column; row <= p; row++)
					sum += root[p * points + row]! * triangle[row * points + column]!;
				square += sum * sum;
			}
			this.sampleDeviation[p]! += (share * square) / degrees;
		}
	}

	/** A chi-square draw: exact for few degrees, by the cube root of Wilson and Hilferty for many. */
	private chiSquare(degrees: number): number {
		if (degrees > 60) {
			const h = 2 / (9 * degrees);
			return degrees * (1 - h + Math.sqrt(h) * this.normal()) ** 3;
		}
		let sum = 0;
		for (let i = 0; i < degrees; i++) sum += this.normal() ** 2;
		return sum;
	}

	/** The factor at which the drawn band holds the content of the devices everywhere. */
	wholeFactor(devices: Float64Array, content: number, sides: BandSides): number {
		const { points } = this;
		const count = devices.length / points;
		const worst = new Float64Array(count);
		for (let d = 0; d < count; d++) {
			let most = -Infinity;
			for (let p = 0; p < points; p++) {
				const off = (devices[d * points + p]! - this.sampleMean[p]!) / this.sampleDeviation[p]!;
				const beyond = sides === 'both' ? Math.abs(off) : sides === 'maximum' ? off : -off;
				if (beyond > most) most = beyond;
			}
			worst[d] = most;
		}
		return quantile(worst.sort(), content);
	}

	/** The factor at which the drawn limit holds the content at one point; in closed form. */
	pointFactor(point: number, content: number, sides: BandSides): number {
		const deviation = this.trueDeviation[point]!;
		const offset = this.sampleMean[point]! / deviation;
		const reach =
			sides === 'both'
				? coveringHalfWidth(offset, content)
				: normalQuantile(content) + (sides === 'maximum' ? -offset : offset);
		return (reach * deviation) / this.sampleDeviation[point]!;
	}
}

/** Square of a row of a lower triangle. */
function rowSquare(root: Float64Array, row: number, points: number): number {
	let sum = 0;
	for (let q = 0; q <= row; q++) sum += root[row * points + q]! ** 2;
	return sum;
}

/** Lower triangular root of a covariance; directions without variance stay zero. */
function choleskyRoot(matrix: Float64Array, points: number): Float64Array {
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
