import { expect, it } from 'vitest';
import { limitMessages } from '../messages/limits';
import { BASES } from './basis';
import { readTableQuery } from './readTableQuery';

const read = (search: string) => readTableQuery(new URLSearchParams(search));

it('reads everything that can be asked', () => {
	expect(
		read('temperatureCelsius=-40&frequency=1e6&biases=-0.2,0,1,4&policy=2&basis=tested')
	).toEqual({
		status: 'read',
		query: {
			temperatureCelsius: -40,
			frequency: 1e6,
			biases: [-0.2, 0, 1, 4],
			policy: 2,
			basis: 'tested'
		}
	});
});

it('asks for everything measured, by the first policy, where the address says nothing', () => {
	expect(read('temperatureCelsius=25')).toEqual({
		status: 'read',
		query: {
			temperatureCelsius: 25,
			frequency: undefined,
			biases: undefined,
			policy: undefined,
			basis: undefined
		}
	});
});

it.each([
	['biases=0', 'temperatureCelsius', limitMessages.expectsTemperature(undefined)],
	['temperatureCelsius=', 'temperatureCelsius', limitMessages.expectsTemperature('')],
	['temperatureCelsius=warm', 'temperatureCelsius', limitMessages.expectsTemperature('warm')],
	['temperatureCelsius=25&frequency=0', 'frequency', limitMessages.expectsFrequency('0')],
	['temperatureCelsius=25&biases=', 'biases', limitMessages.expectsBiases('')],
	['temperatureCelsius=25&biases=1,,4', 'biases', limitMessages.expectsBiases('1,,4')],
	['temperatureCelsius=25&biases=1;4', 'biases', limitMessages.expectsBiases('1;4')],
	['temperatureCelsius=25&policy=1.5', 'policy', limitMessages.expectsPolicy('1.5')],
	['temperatureCelsius=25&policy=', 'policy', limitMessages.expectsPolicy('')],
	['temperatureCelsius=25&basis=sure', 'basis', limitMessages.expectsBasis('sure', BASES)]
])('refuses %s', (search, parameter, message) => {
	expect(read(search)).toEqual({ status: 'refused', parameter, message });
});

it('refuses more biases than a table can have', () => {
	const biases = Array.from({ length: 1001 }, (_, bias) => bias).join(',');
	expect(read(`temperatureCelsius=25&biases=${biases}`)).toMatchObject({
		status: 'refused',
		parameter: 'biases'
	});
});
