import type { LookAlikeId } from '../metal/look-alikes.ts';
import type { Vector } from './grid.ts';

/**
 * What one finding says, in the form in which findings are put together: how likely it was, for each thing that could be so.
 * A part that is absent says nothing. Vectors run over the fineness of the main metal in parts per thousand.
 */
export type Observation = {
	/** By the fineness of the surface. */
	readonly surface?: Vector;
	/** By the fineness of the bulk, whatever lies on it. */
	readonly bulk?: Vector;
	/** By the fineness of the bulk of a piece that is one alloy all through. */
	readonly solid?: Vector;
	/** By the material under a layer; 'as solid' where it cannot be told from the honest piece, and is as likely as that. */
	readonly core?: (core: LookAlikeId) => number | 'as solid';
	/** A streak: of the surface, or of what lies under it when the streak goes through the layer. */
	readonly streak?: { readonly how: 'rub' | 'notch'; readonly values: Vector };
};
