/** Where a piece comes from: how far the market that struck its mark was controlled. It decides the odds before any test. */
export type Origin = 'hallmarked' | 'us-modern' | 'us-before-1981' | 'uncontrolled' | 'unmarked' | 'stranger-bar';

export const origins: readonly Origin[] = [
	'hallmarked',
	'us-modern',
	'us-before-1981',
	'uncontrolled',
	'unmarked',
	'stranger-bar'
];

export function isOrigin(text: string): text is Origin {
	return (origins as readonly string[]).includes(text);
}
