import { expect, it } from 'vitest';
import { verdictForm, verdictReason } from './verdictForm';

const said = { device: 7, conditionKey: 'T=25;f=1000000', reason: ' needle off the pad ' };

it('names the ground of an exclusion and leaves the reason to keep as it is', () => {
	const exclude = verdictForm.parse({ ...said, decision: 'exclude' });
	expect(verdictReason(exclude)).toBe('Measurement fault: needle off the pad');
	expect(verdictReason({ ...exclude, ground: 'screen' })).toBe(
		'Production screen that rejects its like: needle off the pad'
	);
	expect(verdictReason({ ...exclude, decision: 'keep' })).toBe('needle off the pad');
});

it('refuses a verdict without a reason or a decision', () => {
	expect(verdictForm.safeParse({ ...said, decision: 'keep', reason: '  ' }).success).toBe(false);
	expect(verdictForm.safeParse(said).success).toBe(false);
});
