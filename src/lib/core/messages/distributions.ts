export const distributionMessages = {
	notADistribution: () => 'The request is not a distribution to enter; `errors` says where.',
	unknownCharacteristic: (key: string, known: readonly string[]) =>
		`There is no characteristic ${key}; there is ${known.join(', ')}.`,
	conditionMissing: (characteristic: string, axis: string) =>
		`${characteristic} depends on ${axis}; say at which it holds.`,
	conditionUnused: (characteristic: string, axis: string) =>
		`${characteristic} is not stated at a ${axis}; leave it out.`,
	implausible: (typical: string, transformed: string) =>
		`The mean stands for ${typical}, which no diode has. It is the mean of ${transformed}.`,
	isMeasured: () =>
		'Devices are measured at this condition, or at biases around it: their distribution stands, and an entered one would not be used.'
};
