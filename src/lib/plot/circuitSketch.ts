import type { TestCircuit } from '../core/template/template';
import {
	capacitor,
	diode,
	ground,
	inductor,
	instrument,
	joint,
	label,
	named,
	port,
	resistor,
	round,
	wire
} from './circuitParts';
import { sketchOf, type Sketch, type SketchMark } from './sketch';

/** The set-up that measures a characteristic, as a circuit diagram. */
export function circuitSketch(circuit: TestCircuit): Sketch {
	return sketchOf(CIRCUITS[circuit]());
}

const CIRCUITS = {
	capacitance,
	'pulsed-forward': pulsedForward,
	'reverse-recovery': reverseRecovery,
	'series-resistance': seriesResistance
} as const satisfies Record<TestCircuit, () => SketchMark[]>;

/** Bias through a choke, the bridge behind capacitors that block it. */
function capacitance(): SketchMark[] {
	return [
		...round([0, 20], [0, 84], { quantity: 'V', subscript: 'R' }),
		wire([0, 20], [0, 0], [16, 0]),
		...resistor([16, 0], [56, 0]),
		label('100 kΩ', [36, -8]),
		wire([56, 0], [84, 0]),
		joint([84, 0]),
		...diode([84, 84], [84, 0]),
		label('device', [96, 39], 'left'),
		label('under test', [96, 49], 'left'),
		...capacitor([84, 0], [146, 0]),
		label('blocks bias', [115, -13]),
		wire([146, 0], [154, 0]),
		port([156, 0]),
		...instrument([158, -10], [58, 104], ['capacitance', 'bridge']),
		port([156, 84]),
		wire([0, 84], [154, 84]),
		joint([84, 84]),
		...ground([84, 84])
	];
}

/** Pulsed current through two leads, voltage from two others at the device. */
function pulsedForward(): SketchMark[] {
	return [
		...round([0, 12], [0, 72], { quantity: 'I', subscript: 'F' }),
		label('pulsed', [-14, 45], 'right'),
		wire([0, 12], [0, 0], [84, 0]),
		joint([84, 0]),
		...diode([84, 0], [84, 84]),
		label('device', [74, 39], 'right'),
		label('under test', [74, 49], 'right'),
		wire([84, 0], [140, 0], [140, 14]),
		...round([140, 14], [140, 70], { quantity: 'V', subscript: 'F' }),
		wire([140, 70], [140, 84], [84, 84]),
		label('own leads', [155, 40], 'left'),
		label('to the body', [155, 50], 'left'),
		wire([0, 72], [0, 84], [84, 84]),
		joint([84, 84]),
		...ground([84, 84])
	];
}

/** Forward current until the pulse turns it round; the current is seen as a voltage at 50 Ω. */
function reverseRecovery(): SketchMark[] {
	return [
		...instrument([-54, 6], [52, 68], ['pulse', 'generator', '50 Ω']),
		port([0, 16]),
		wire([1.8, 16], [10, 16]),
		...capacitor([10, 16], [36, 16]),
		wire([36, 16], [54, 16]),
		joint([42, 16]),
		...inductor([42, 16], [42, -26]),
		port([42, -28]),
		...named({ quantity: 'I', subscript: 'F' }, [49, -25], 'left'),
		...diode([54, 16], [88, 16]),
		label('device under test', [88, 2]),
		wire([88, 16], [114, 16]),
		joint([104, 16]),
		...resistor([104, 16], [104, 64]),
		label('50 Ω', [97, 43], 'right'),
		port([116, 16]),
		...instrument([118, 6], [58, 68], ['sampling', 'oscilloscope']),
		port([116, 64]),
		port([0, 64]),
		wire([1.8, 64], [114, 64]),
		joint([104, 64]),
		joint([58, 64]),
		...ground([58, 64])
	];
}

/** Bias by a tee; the analyser reads the reflection at the device's own plane. */
function seriesResistance(): SketchMark[] {
	return [
		...instrument([-54, 4], [52, 66], ['vector', 'network', 'analyser']),
		port([0, 14]),
		...capacitor([1.8, 14], [44, 14]),
		wire([44, 14], [92, 14], [92, 18]),
		joint([52, 14]),
		...inductor([52, 14], [52, -28]),
		port([52, -30]),
		...named({ quantity: 'V', subscript: 'R' }, [59, -27], 'left'),
		label('bias tee', [23, -2]),
		...diode([92, 60], [92, 18]),
		label('device under test', [104, 36], 'left'),
		label('at the calibrated plane', [104, 46], 'left'),
		port([0, 60]),
		wire([1.8, 60], [92, 60]),
		joint([52, 60]),
		...ground([52, 60])
	];
}
