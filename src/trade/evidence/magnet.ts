import { lookAlike } from '../metal/look-alikes.ts';
import type { Pull } from './finding.ts';
import { flat } from './grid.ts';
import type { Observation } from './observation.ts';
import type { MainMetal } from './subject.ts';

type Pulls = Readonly<Record<Pull, number>>;

/** How often a thing is drawn to a magnet; springs in clasps draw a little. Working defaults, common practice, no source. */
const PULLS: Readonly<Record<'none' | 'some' | 'strong', Pulls>> = {
	none: { none: 0.97, weak: 0.025, strong: 0.005 },
	some: { none: 0.5, weak: 0.3, strong: 0.2 },
	strong: { none: 0.05, weak: 0.25, strong: 0.7 }
};

/** Platinum alloyed with cobalt is drawn a little. */
const OF_PLATINUM: Pulls = { none: 0.86, weak: 0.12, strong: 0.02 };

/**
 * What a magnet says: of the material under a layer, whether it holds iron.
 * formula: the chance of that pull for a solid piece of the metal, and for each material under a layer.
 * rounding: none.
 * source: common practice, no source; working defaults.
 */
export function magnetObservation(pull: Pull, metal: MainMetal): Observation {
	const solid = (metal === 'Pt' ? OF_PLATINUM : PULLS.none)[pull];
	return { solid: flat().fill(solid), core: (core) => PULLS[lookAlike(core).magnet][pull] };
}
