import { draftMessages } from '../messages/datasheet';
import { guarantees } from './boundTexts';
import type { DatasheetStatus } from './document';
import { isPrinted, type Place } from './place';
import type { DraftProblem } from './resolveInput';

/**
 * What a status asks of the places.
 *
 * | | target | preliminary | production |
 * | --- | --- | --- | --- |
 * | a measured limit | – | one | one |
 * | stale, unsupported | – | settled | settled |
 * | essential | – | – | bound, or struck out with a reason |
 * | lots and devices of the policy | – | – | enough behind each minimum and maximum |
 */
export function checkStatus(status: DatasheetStatus, places: readonly Place[]): DraftProblem[] {
	switch (status) {
		case 'target':
			return [];
		case 'preliminary':
			return [...nothingPrinted(status, places), ...places.flatMap(unsettled)];
		case 'production':
			return [
				...nothingPrinted(status, places),
				...places.flatMap((place) => [...unsettled(place), ...missing(place), ...tooLittle(place)])
			];
		default:
			return status satisfies never;
	}
}

const problem = ({ id, label }: Place, message: string): DraftProblem => ({
	place: id,
	label,
	message
});

function nothingPrinted(status: DatasheetStatus, places: readonly Place[]): DraftProblem[] {
	const measured = places.some((place) => place.kind === 'limit' && isPrinted(place));
	return measured
		? []
		: [{ place: 'status', label: 'Status', message: draftMessages.nothingPrinted(status) }];
}

function unsettled(place: Place): DraftProblem[] {
	if (place.state === 'stale') return [problem(place, draftMessages.settleStale())];
	if (place.state === 'unsupported') return [problem(place, draftMessages.settleUnsupported())];
	return [];
}

function missing(place: Place): DraftProblem[] {
	return place.essential && place.state === 'unbound'
		? [problem(place, draftMessages.essentialUnbound())]
		: [];
}

/** The policy's own demands, for what is promised; a typical value promises nothing. */
function tooLittle(place: Place): DraftProblem[] {
	const { prints, binding, policy, basis } = place;
	if (binding?.kind !== 'limit' || basis === null) return [];
	if (prints === null || (prints.minimum === null && prints.maximum === null)) return [];
	if (policy === null) return [problem(place, draftMessages.policyUnknown(binding.policyVersion))];
	const { name, minimumLots, minimumDevices } = policy.rules;
	return [
		...(guarantees(basis, policy.rules)
			? []
			: [problem(place, draftMessages.sigmaNoGuarantee(name))]),
		...(place.independentLots < minimumLots
			? [problem(place, draftMessages.tooFewLots(minimumLots, place.independentLots, name))]
			: []),
		...(place.sampleSize < minimumDevices
			? [problem(place, draftMessages.tooFewDevices(minimumDevices, place.sampleSize, name))]
			: [])
	];
}
