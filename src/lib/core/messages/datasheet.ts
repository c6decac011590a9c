const list = (items: readonly string[]) => items.join(', ');

export const draftMessages = {
	nothingComputed: (name: string) =>
		`No stored measurement gives ${name} at this condition. Bind it when it is measured, or strike it out with a reason.`,
	bindingUnread: () => 'Nothing is bound here yet.',
	ratingIsTyped: () => 'A rating is typed by a person, with a reason.',
	ratingUntyped: () => 'No value is typed yet.',
	missingParts: (parts: readonly string[], refusals: readonly string[]) =>
		refusals.length > 0
			? refusals.join(' ')
			: `The measurements give no ${parts.join(' and no ')} here.`,
	measurementsGone: () =>
		'No stored measurement stands behind this any more. Strike it out, or keep what was printed with a reason.',
	stale: (printed: string, now: string) =>
		`Prints ${printed} as bound; the measurements now say ${now}.`,
	unsupported: (why: string) => `The measurements no longer carry what is printed: ${why}`,
	essentialUnbound: () =>
		'Essential for this class: bind it, or strike it out with a reason, before submitting.',
	settleStale: () =>
		'Newer data moved it: bind the new value, or keep the printed one with a reason.',
	settleUnsupported: () =>
		'The measurements no longer carry it: bind what they do carry, keep the printed value with a reason, or strike it out.',
	tooFewLots: (required: number, actual: number, policy: string) =>
		`${policy} asks for ${required} independent lots behind a production limit, and ${actual} ${actual === 1 ? 'is' : 'are'} measured.`,
	tooFewDevices: (required: number, actual: number, policy: string) =>
		`${policy} asks for ${required} devices behind a production limit, and ${actual} ${actual === 1 ? 'is' : 'are'} measured.`,
	policyUnknown: (id: number) => `Policy version ${id}, by which this was bound, is not stored.`,
	sigmaNoGuarantee: (policy: string) =>
		`${policy} is mean ± kσ, which promises nothing by itself: it prints a minimum and maximum only with the basis “tested on every device”.`,
	outOfOrder: (lower: string, upper: string) => `The ${lower} is above the ${upper}.`,
	rises: (part: string, bias: string, before: string) =>
		`The ${part} at ${bias} V is above that at ${before} V, but capacitance falls with reverse bias.`,
	beyondRating: (bias: string, rating: string) =>
		`${bias} V is above the reverse voltage rating of ${rating} V.`,
	ratingAboveBreakdown: (rating: string, breakdown: string) =>
		`A reverse voltage rating of ${rating} V is above the smallest breakdown voltage, ${breakdown} V.`,
	powerContradicts: (power: string, possible: string) =>
		`${power} is more than the thermal resistance allows: (T_j − 25 °C) / R_th is ${possible}.`,
	ratingStep: (rounded: string, step: number) =>
		`It is printed in steps of ${step}, rounded so that it claims less: ${rounded}.`,
	ratingEnds: (needed: readonly string[]) => `Type the ${list(needed)}.`,
	ratingEndsOrder: () => 'The minimum has to be below the maximum.',
	nothingPrinted: (status: string) =>
		`A ${status} datasheet prints at least one measured limit. A datasheet without measurements has the status target.`,
	differsFrom: (label: string) =>
		`Prints something else than ${label}, though it is the same quantity.`,
	placeholderUnread: (text: string) =>
		`${text} can’t be read. Write {C_tot @ V_R=4 V : typ}, with min, typ or max behind the colon.`,
	placeholderUnknown: (text: string) => `${text} names nothing that this datasheet prints.`,
	placeholderNoValue: (text: string, part: string) => `${text} has no ${part} to print.`,
	placeholderOpen: () => 'A brace is opened and not closed.',

	productUnknown: (partNumber: string) => `There is no product ${partNumber}.`,
	draftAlreadyOpen: (partNumber: string) => `${partNumber} has a draft already.`,
	noDraft: (partNumber: string) => `${partNumber} has no draft yet. Open one first.`,
	templateUnknown: (key: string) => `There is no template “${key}”.`,
	templateOfOtherClass: (template: string, wanted: string) =>
		`The template ${template} is for another class; this product is a ${wanted}.`,
	policyVersionUnknown: () => 'That limit policy is not stored.',
	slotUnknown: (slot: string) => `This datasheet’s template has no place “${slot}”.`,
	slotOfOtherKind: (label: string, kind: string) => `${label} can’t be filled with a ${kind}.`,
	movedMeanwhile: () =>
		'The measurements moved it again while you looked. Compare the new numbers, then decide.',
	nothingToBind: (label: string, why: string) => `${label} can’t be bound. ${why}`,
	nothingToKeep: (label: string) =>
		`${label} prints what the measurements say; there is nothing to keep.`,
	basisNeedsReason: (basis: string) =>
		`Say which test or study makes it “${basis}”; the computation alone doesn’t.`,
	basisTypicalRequired: (parts: readonly string[]) =>
		`A basis of “typical” prints no limits, and this place needs its ${list(parts)}.`,
	reasonNeeded: () => 'Give a reason: the next reader asks for it.',
	blockUnknown: (block: string) => `This datasheet’s template has no text “${block}”.`,
	writtenMeanwhile: (by: string | null) =>
		`${by ?? 'Somebody'} changed this text while you wrote. Both texts are below; nothing was lost.`,
	charactersMissing: (names: readonly string[]) =>
		`The datasheet’s typefaces have no ${list(names)}. Write it another way.`,
	changedMeanwhile: () => 'The draft was changed while you looked. Look again, then decide.',
	formUnread: () => 'The form could not be read. Nothing was changed.',
	settingsChanged: () => 'The settings are changed.',
	everythingBound: (bound: number, left: number) =>
		`${bound} ${bound === 1 ? 'place is' : 'places are'} bound, ${left} left open.`,
	bound: () => 'Bound.',
	keptAsPrinted: () => 'Kept as printed, with your reason.',
	struckOut: () => 'Struck out, with your reason.',
	cleared: () => 'Emptied.',
	rated: () => 'The rating is set.',
	written: () => 'The text is saved.',
	notSubmitted: () => 'Not submitted. These are to be settled first:',
	proofFailed: (why: string) => `The proof could not be drawn. ${why}`
};

/** Statements that stand on the printed datasheet. */
export const sheetTexts = {
	limitingValues: () =>
		'limiting values in accordance with the absolute maximum rating system of IEC 60134',
	characteristicsNote: () => 'limits hold at the stated conditions only',
	typicalValues: () => 'Typical values are medians of the devices measured and are not guaranteed.',
	rounding: () => 'Minima are rounded down and maxima up; maximum ratings are rounded down.',
	statistical: () =>
		'Statistical limits rest on the lots measured and do not replace production test.',
	deviations: () => 'Deviations are from the printed typical value, rounded to the nearest 0.1 %.',
	ratio: (bias: string) =>
		`The ratio is of typical values, that at the stated bias over that at ${bias} V, and is not guaranteed.`,
	preliminary: () =>
		'Preliminary: limits are provisional, rest on the first lots and may change before production.',
	target: () => 'Target: every number is an aim of the design, and none of them is guaranteed.',
	chartCaption: () =>
		'Total capacitance against reverse voltage: typical curve and band between the printed limits; straight lines in log–log between table rows.',
	furtherChanges: (count: number) => `and ${count} more`,
	typicalCurve: () => 'typical',
	fittedCurve: () => 'typical, by the law of the model',
	typicalDevice: () => 'typical device',
	modelFile: () => 'text of model.lib',
	modelNote: (points: number, worst: string) =>
		`One power law with the case in parallel, fitted to the ${points} typical values of the capacitance table; it gives them back within ${worst} %. Leakage is not modelled.`,
	tested: () => 'tested on every device',
	sampleTested: () => 'sample-tested: a sample of each lot',
	correlation: () => 'guaranteed by correlation with a characteristic that is tested',
	typical: () => 'typical, not guaranteed',
	characterized: (devices: string, lots: string) => `characterized on ${devices} of ${lots}`,
	devices: () => 'devices',
	futureDevices: () => 'devices of future lots',
	eachLimit: (content: string, confidence: string, devices: string) =>
		`with ${confidence} confidence at least ${content} of ${devices} lie above the minimum, and at least ${content} below the maximum; each limit on its own`,
	bothLimits: (content: string, confidence: string, devices: string) =>
		`with ${confidence} confidence at least ${content} of ${devices} lie between minimum and maximum`,
	wholeCurve: () => 'along the entire curve',
	houseRule: (k: number) => `limits at mean ± ${k} σ, behind a test of every device`
};
