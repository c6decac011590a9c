import type { Face } from '../fonts/faces';

/** A step of a path, in pt from the drawing's upper left corner, y downwards. */
export type PathStep =
	| { readonly to: 'move' | 'line'; readonly at: readonly [number, number] }
	| {
			readonly to: 'curve';
			readonly by: readonly [number, number];
			readonly then: readonly [number, number];
			readonly at: readonly [number, number];
	  }
	| { readonly to: 'close' };

/** Red, green and blue, each 0 to 1. */
export type Colour = readonly [number, number, number];

/** One painted thing of a chart. */
export type DrawnMark =
	| {
			readonly kind: 'path';
			readonly steps: readonly PathStep[];
			readonly fill: Colour | null;
			readonly stroke: {
				readonly colour: Colour;
				readonly width: number;
				readonly dash: readonly number[];
				readonly cap: 0 | 1 | 2;
				readonly join: 0 | 1 | 2;
			} | null;
	  }
	| {
			readonly kind: 'text';
			readonly text: string;
			readonly face: Face;
			readonly size: number;
			readonly colour: Colour;
			readonly at: readonly [number, number];
			/** Anticlockwise from the horizontal, in degrees. */
			readonly angle: number;
	  }
	/** Everything up to the matching `restore` is drawn inside this path only. */
	| { readonly kind: 'clip'; readonly steps: readonly PathStep[] }
	| { readonly kind: 'restore' };
