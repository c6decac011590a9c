import { describe, expect, it } from 'vitest';
import {
	mayNotPublishOwnApproval,
	mayNotVerifyOwnEdit,
	mayNotVerifyOwnSubmission,
	rolesDoNotAllow
} from '../messages/review';
import { ROLES, type Role } from './permissions';
import { mayDecide, mayPublish, mayVerify, type RevisionHands } from './separation';

const HANDS: RevisionHands = { submittedBy: 'ida', editors: ['ida', 'noor'], approvedBy: 'tomas' };
const EVERYTHING = ROLES;
const reason = (allowance: ReturnType<typeof mayDecide>) =>
	allowance.permitted ? undefined : allowance.reason;

describe('by role alone, somebody who had no hand in it', () => {
	it.each(ROLES.map((role) => [role]))('%s', (role: Role) => {
		const actor = { id: 'mira', roles: [role] };
		expect(mayVerify(actor, HANDS).permitted).toBe(role === 'applications_engineer');
		expect(mayDecide(actor, HANDS).permitted).toBe(role === 'applications_engineer');
		expect(mayPublish(actor, HANDS).permitted).toBe(role === 'marketing');
	});
});

describe('by hand, somebody who holds every role', () => {
	it.each([
		['who submitted it', 'ida', mayNotVerifyOwnSubmission()],
		['who edited the draft', 'noor', mayNotVerifyOwnEdit()],
		['who approved it before', 'tomas', undefined],
		['who had no hand in it', 'mira', undefined]
	])('%s verifies and decides', (_who, id, refusal) => {
		expect(reason(mayVerify({ id, roles: EVERYTHING }, HANDS))).toBe(refusal);
		expect(reason(mayDecide({ id, roles: EVERYTHING }, HANDS))).toBe(refusal);
	});

	it('may publish what they submitted when another person approved it', () => {
		expect(mayPublish({ id: 'ida', roles: EVERYTHING }, HANDS).permitted).toBe(true);
	});

	it('may publish what they approved when another person submitted it', () => {
		expect(mayPublish({ id: 'tomas', roles: EVERYTHING }, HANDS).permitted).toBe(true);
	});

	it('may not publish what they both submitted and approved', () => {
		const alone = { ...HANDS, approvedBy: 'ida' };
		expect(reason(mayPublish({ id: 'ida', roles: EVERYTHING }, alone))).toBe(
			mayNotPublishOwnApproval()
		);
	});
});

it('gives an administrator no right of their own', () => {
	const administrator = { id: 'per', roles: ['administrator'] as const };
	expect(reason(mayDecide(administrator, HANDS))).toBe(
		rolesDoNotAllow('approve or return a revision')
	);
	expect(reason(mayPublish(administrator, HANDS))).toBe(rolesDoNotAllow('publish a release'));
});
