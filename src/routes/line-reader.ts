/** What reads a typed line and answers it: loaded right after the counter is drawn, so that it does not hold up the start. */
export { parseLine } from '$trade/lot/line.ts';
export { lineChoices } from '$ui/line-choices.ts';
export { sentence } from '$ui/sentences.ts';
