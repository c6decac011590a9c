import { choleskyRoot, rowSquare } from './choleskyRoot';
import { coveringHalfWidth } from './coveringHalfWidth';
import { normalQuantile } from './normalQuantile';
import type { RandomSource } from './randomSource';
import { selectQuantile } from './selectQuantile';

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

/** How far a limit reaches from the variance of lot means and that within lots. */
export type MarginOf = (ofLotMeans: number, withinLots: number) => number;

/** Draws samples and future devices of a curve, in deviations from its true mean. */
export class CurveSimulator {
	private readonly points: number;
	private readonly lotRoot: Float64Array;
	private readonly withinRoot: Float64Array;
	private readonly betweenRoot: Float64Array;
	private readonly trueDeviation: Float64Array;
	/** Mean and margin of the drawn sample at each point, and the variances behind the margin. */
	private readonly sampleMean: Float64Array;
	private readonly sampleMargin: Float64Array;
	private readonly ofLotMeans: Float64Array;
	private readonly withinLots: Float64Array;
	private readonly triangle: Float64Array;

	constructor(
		private readonly curve: CurveCovariance,
		private readonly marginOf: MarginOf,
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
		this.sampleMargin = new Float64Array(points);
		this.ofLotMeans = new Float64Array(points);
		this.withinLots = new Float64Array(points);
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

	/** Means and margins that a sample of this design would show. */
	drawSample(): void {
		const { lots, withinDegrees } = this.curve;
		const scale = 1 / Math.sqrt(lots);
		const draw = Float64Array.from({ length: this.points }, () => this.normal() * scale);
		for (let p = 0; p < this.points; p++) {
			let sum = 0;
			for (let q = 0; q <= p; q++) sum += this.lotRoot[p * this.points + q]! * draw[q]!;
			this.sampleMean[p] = sum;
		}
		this.drawVariances(this.lotRoot, lots - 1, this.ofLotMeans);
		this.drawVariances(this.withinRoot, withinDegrees, this.withinLots);
		for (let p = 0; p < this.points; p++)
			this.sampleMargin[p] = this.marginOf(this.ofLotMeans[p]!, this.withinLots[p]!);
	}

	/** Diagonal of Wishart / degrees: the row squares of root × Bartlett's triangle. */
	private drawVariances(root: Float64Array, degrees: number, variances: Float64Array): void {
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
			variances[p] = square / degrees;
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

	/** What the drawn margins are multiplied with to hold the content of the devices everywhere. */
	wholeFactor(devices: Float64Array, content: number, sides: BandSides): number {
		const { points } = this;
		const count = devices.length / points;
		const worst = new Float64Array(count);
		const inverse = this.sampleMargin.map((margin) => 1 / margin);
		for (let d = 0; d < count; d++) {
			let [least, most] = [Infinity, -Infinity];
			for (let p = 0; p < points; p++) {
				const off = (devices[d * points + p]! - this.sampleMean[p]!) * inverse[p]!;
				if (off > most) most = off;
				if (off < least) least = off;
			}
			worst[d] = sides === 'both' ? Math.max(most, -least) : sides === 'maximum' ? most : -least;
		}
		return selectQuantile(worst, content);
	}

	/** The same at one point alone; in closed form. */
	pointFactor(point: number, content: number, sides: BandSides): number {
		const deviation = this.trueDeviation[point]!;
		const offset = this.sampleMean[point]! / deviation;
		const reach =
			sides === 'both'
				? coveringHalfWidth(offset, content)
				: normalQuantile(content) + (sides === 'maximum' ? -offset : offset);
		return (reach * deviation) / this.sampleMargin[point]!;
	}
}
