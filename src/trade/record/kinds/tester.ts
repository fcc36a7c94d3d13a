import { checkTester, testerKinds, type Tester, type TesterRow } from '../../evidence/tester.ts';
import { list, name, number, nullable, object, oneOf, refined, text, within } from '../shape.ts';
import { metal } from './shared.ts';

/** More alloys than anybody checks a tester on. */
const MOST_ROWS = 200;

/** A tester or a set of acids of the shop. The record's subject is the tester's id. */
export const testerShape = refined(
	object<Tester>({
		id: name,
		name: text,
		kind: oneOf(testerKinds),
		rows: list(object<TesterRow>({ metal, colour: oneOf(['any', 'white']), perMille: within(0, 1000), u: number }), MOST_ROWS),
		bias: number,
		gross: number,
		checkedOn: nullable(text)
	}),
	(tester) => {
		const checked = checkTester(tester);
		return checked.ok ? null : `a tester (${checked.problem.kind})`;
	}
);
