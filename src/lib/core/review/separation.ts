import {
	mayNotPublishOwnApproval,
	mayNotVerifyOwnEdit,
	mayNotVerifyOwnSubmission,
	rolesDoNotAllow
} from '../messages/review';
import { isPermitted, type Role } from './permissions';

/** Who had their hands in a revision. Person ids. */
export interface RevisionHands {
	readonly submittedBy: string;
	/** Everybody who edited the draft since the last release. */
	readonly editors: readonly string[];
	/** Who approved it; `null` while nobody has. */
	readonly approvedBy: string | null;
}

export interface Actor {
	readonly id: string;
	readonly roles: readonly Role[];
}

const DOING = {
	'revision.verify': 'verify rows',
	'revision.approve': 'approve or return a revision',
	'release.publish': 'publish a release'
} as const;

export type Allowance =
	{ readonly permitted: true } | { readonly permitted: false; readonly reason: string };

const PERMITTED: Allowance = { permitted: true };
const refuse = (reason: string): Allowance => ({ permitted: false, reason });

/**
 * Whether a person may verify or decide *this* revision. The role alone isn't enough: who submitted
 * it or edited its draft since the last release would be checking their own work. Being
 * administrator changes nothing.
 */
function asSecondPerson(
	actor: Actor,
	hands: RevisionHands,
	permission: keyof typeof DOING
): Allowance {
	if (!isPermitted(actor.roles, permission)) return refuse(rolesDoNotAllow(DOING[permission]));
	if (actor.id === hands.submittedBy) return refuse(mayNotVerifyOwnSubmission());
	if (hands.editors.includes(actor.id)) return refuse(mayNotVerifyOwnEdit());
	return PERMITTED;
}

/** Whether a person may tick and flag rows of this revision. */
export function mayVerify(actor: Actor, hands: RevisionHands): Allowance {
	return asSecondPerson(actor, hands, 'revision.verify');
}

/** Whether a person may approve or return this revision. */
export function mayDecide(actor: Actor, hands: RevisionHands): Allowance {
	return asSecondPerson(actor, hands, 'revision.approve');
}

/** Whether a person may publish this revision: its approver only if another person submitted it. */
export function mayPublish(actor: Actor, hands: RevisionHands): Allowance {
	if (!isPermitted(actor.roles, 'release.publish'))
		return refuse(rolesDoNotAllow(DOING['release.publish']));
	if (actor.id === hands.approvedBy && actor.id === hands.submittedBy)
		return refuse(mayNotPublishOwnApproval());
	return PERMITTED;
}
