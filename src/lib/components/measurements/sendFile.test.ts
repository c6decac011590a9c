import { expect, it } from 'vitest';
import { readAnswer } from './sendFile';

it.each([
	[202, '{"upload":{"id":7},"job":{"id":9}}', { status: 'received', upload: 7 }],
	[
		409,
		'{"detail":"This file was uploaded before.","upload":{"id":3}}',
		{ status: 'refused', message: 'This file was uploaded before.', earlier: 3 }
	],
	[413, '{"detail":"Too large."}', { status: 'refused', message: 'Too large.' }],
	[
		502,
		'<html>',
		{ status: 'refused', message: 'The server answered with 502; nothing was kept.' }
	],
	[202, '{}', { status: 'refused', message: 'The server answered with 202; nothing was kept.' }]
])('%d %s', (status, body, expected) => {
	expect(readAnswer(status, body)).toEqual(expected);
});
