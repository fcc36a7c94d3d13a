import type { Build } from '$trade/evidence/belief.ts';

/** How a piece is made. */
export const buildWords: Readonly<Record<Build, string>> = {
	solid: 'solid, no room for air',
	jointed: 'links or joints that hold a little air',
	hollow: 'hollow links, tubes or shells'
};
