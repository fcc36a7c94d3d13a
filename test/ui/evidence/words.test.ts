import { describe, expect, it } from 'vitest';
import { assess } from '$trade/evidence/assess.ts';
import { contradictions } from '$trade/evidence/contradiction.ts';
import type { Finding } from '$trade/evidence/finding.ts';
import { startOf } from '$trade/evidence/start.ts';
import type { Subject } from '$trade/evidence/subject.ts';
import { contradictionWords, coreWords, nextWords, unseenWords, verdict } from '../../../src/ui/evidence/belief-words.ts';
import { curveSpan, placedLabels } from '../../../src/ui/evidence/curve-span.ts';
import { findingWords } from '../../../src/ui/evidence/finding-words.ts';
import { karatWords, standardsOf } from '../../../src/ui/evidence/karat-words.ts';
import { readersOf } from '../../../src/ui/evidence/readers.ts';
import { testedWords } from '../../../src/ui/piece-words.ts';
import { formatFor } from '../../../src/ui/format.ts';
import { assay, bar999, chain14, core, karat, magnet, reading, stamped14, touch, unmarked, water } from '../../trade/evidence/some-findings.ts';

const format = formatFor('en');
const tidy = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ');
const said = (subject: Subject, ...findings: Finding[]) => tidy(verdict(subject, assess(startOf(subject), findings), findings.length > 0, format));
const what = (finding: Finding) => tidy(findingWords(finding, stamped14, format, (id) => (id === 'x' ? 'Pocket reader' : null)).what);

describe('what is said of a piece', () => {
	it('is its mark, when nothing was tested', () => {
		expect(said(stamped14)).toMatch(/^By its mark alone, untested: 14 kt, 5\d\d–58\d ‰/);
		expect(said(unmarked)).toBe('It has no mark and no test: it may be anything.');
	});
	it('is a verdict, when something was', () => {
		expect(said(stamped14, touch(), reading(588))).toMatch(/^It is what its mark says, 14 kt: 57\d–58\d ‰/);
		expect(said(chain14, touch(), reading(588), water(8.75))).toMatch(/^It may be filled: \d\d/);
		expect(said(stamped14, core(12))).toMatch(/^This is a layer over something else/);
		expect(said(stamped14, core(417, { u: 3 }), reading(418, { u: 3 }))).toMatch(/^It is not 14 kt, it is another standard/);
		expect(said(stamped14, assay(560))).toMatch(/^It runs under its mark/);
		expect(said(unmarked, core(588))).toMatch(/^Without a mark it is what the tests say/);
	});
	it('names who disagrees with whom, once', () => {
		const findings = [touch(), reading(588), water(8.55)];
		const words = contradictionWords(contradictions(startOf(chain14), findings), 'Au', format).map(tidy);
		expect(words).toEqual([
			'The mark says 14 kt, the streak says 14 kt, the fluorescence reading says 588 ‰, but the water says brass or nickel silver (8.55 g/cm³).'
		]);
		expect(contradictionWords(contradictions(startOf(stamped14), [magnet('strong')]), 'Au', format)).toEqual([
			'The mark says 14\u00a0kt, but the magnet draws it strongly.'
		]);
	});
	it('says what nobody has seen, and what to do next', () => {
		expect(unseenWords([], 0, format)).toBe('');
		expect(tidy(unseenWords(['tungsten'], 0.017, format))).toBe('No test done so far can see tungsten under the surface: that stays at 1.7 %.');
		expect(coreWords(['brass', 'copper', 'lead'])).toBe('brass, copper or lead');
		const money = (value: number) => `${value} USD`;
		expect(nextWords([], money)).toBe('No further test is worth its cost before you buy.');
		const test = { kind: 'core' as const, u: 16, gross: 0.005 };
		expect(nextWords([{ test, gain: 259, cost: 12, net: 247 }], money)).toBe(
			'Cut it and read the inside: knowing is worth 259 USD before you buy, and costs 12 USD.'
		);
		expect(nextWords([{ test, gain: 2, cost: 12, net: -10 }], money)).toBe('No further test is worth its cost before you buy.');
	});
});

describe('a finding as a row', () => {
	it('says what was done, what it showed and how good it is', () => {
		expect(what(touch())).toBe('Streak rubbed off the surface: withstands the acid for 14 kt, is attacked by the one for 18 kt');
		expect(what(touch({ how: 'notch', holds: null, attackedBy: karat(10) }))).toBe('Streak out of a filed notch: is attacked by the one for 10 kt');
		expect(what(reading(588))).toBe('Fluorescence reading: Au 588 ‰');
		expect(what(core(12.5))).toBe('Core test: 12.5 ‰');
		expect(what(assay(580))).toBe('Fire assay: 580 ‰');
		expect(what(magnet('weak'))).toBe('Magnet: drawn a little');
		expect(what(water(13.1))).toMatch(/^Water weighing: 13\.1 ± 0\.0\d g\/cm³$/);
		const words = findingWords(reading(588), stamped14, format, () => 'Pocket reader');
		expect(tidy(words.how)).toBe('good to ±16 ‰ · the surface only · Pocket reader');
	});
	it('says why a weighing is mute, and what would help', () => {
		const { mute } = findingWords(water(13.1, 2), stamped14, format, () => null);
		expect(tidy(mute)).toMatch(/^Too light for this scale.*at least \d g of pieces alike, or a scale with steps of 0\.00\d g\.$/);
		expect(findingWords(water(13.1, 20), stamped14, format, () => null).mute).toBe('');
	});
	it('counts tests beside the piece, and its doubt', () => {
		const belief = { metal: 'Au' as const, mean: 471, low: 4, median: 580, high: 585, odds: { honest: 0.8, under: 0, other: 0, layered: 0.194 }, shared: {}, own: 200 };
		const evidence = { build: null, findings: [touch(), water(8.75)], belief, taking: null };
		expect(tidy(testedWords({ evidence }, format))).toBe('2 tests, 19.4 % to be filled');
		expect(testedWords({ evidence: { ...evidence, findings: [touch()], belief: null } }, format)).toBe('1 test');
		expect(testedWords({}, format)).toBe('');
	});
});

describe('figures and lists', () => {
	it('are karats where gold is near one', () => {
		expect(['Au', 'Ag'].map((metal) => tidy(karatWords(585, metal as 'Au', format)))).toEqual(['14 kt', '585 ‰']);
		expect(tidy(karatWords(560, 'Au', format))).toBe('560 ‰');
		expect(standardsOf('Au', format).map(({ value }) => value)).toContain('14k');
		expect(standardsOf('Ag', format).map(({ value }) => value)).toContain('925');
	});
	it('has the testers of the shop first, and one that is not in the book', () => {
		const own = { id: 'a', name: 'Acids', kind: 'acids' as const, rows: [], bias: 1, gross: 0, checkedOn: null };
		expect(readersOf('acids', [own]).map(({ id }) => id)).toEqual(['a', null]);
		expect(readersOf('fluorescence', [own]).map(({ name }) => name)).toEqual(['working defaults']);
	});
});

describe('the picture of the bulk', () => {
	it('shows all that is likely, and everything where that is most of it', () => {
		expect(curveSpan(assess(startOf(stamped14), [core(12)]), 585)).toEqual({ low: 0, high: 1000 });
		const narrow = curveSpan(assess(startOf(stamped14), [assay(580)]), 585);
		expect(narrow.low).toBeGreaterThan(560);
		expect(narrow.high).toBeLessThan(600);
		const bar = curveSpan(assess(startOf(bar999), [core(999, { u: 1 })]), 999);
		expect(bar.high).toBeLessThanOrEqual(1000);
	});
	it('puts labels one under the other, turned to where there is room', () => {
		const placed = placedLabels([{ at: 580, label: 'mark', tone: 1 }, { at: 20, label: 'prudent', tone: 2 }], (at) => at, 1000);
		expect(placed.map(({ label, anchor }) => [label, anchor])).toEqual([['prudent', 'start'], ['mark', 'end']]);
		expect(placed[1]!.y).toBeGreaterThan(placed[0]!.y);
	});
});
