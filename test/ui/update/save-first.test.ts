import { describe, expect, it } from 'vitest';
import { saveAll, saveBeforeUpdate } from '$ui/update/save-first.ts';

const later = (ms: number) => new Promise<void>((resolve) => setTimeout(resolve, ms));

describe('saving drafts before a tab is loaded afresh', () => {
	it('waits for every draft', async () => {
		const saved: string[] = [];
		const off = [
			saveBeforeUpdate(async () => {
				await later(20);
				saved.push('slow');
			}),
			saveBeforeUpdate(() => void saved.push('quick'))
		];
		await saveAll(5_000);
		expect(saved).toEqual(['quick', 'slow']);
		off.forEach((stop) => stop());
	});
	it('lets one that fails not hold up the others', async () => {
		const saved: string[] = [];
		const off = [
			saveBeforeUpdate(() => {
				throw new Error('at once');
			}),
			saveBeforeUpdate(async () => Promise.reject(new Error('later'))),
			saveBeforeUpdate(async () => {
				await later(5);
				saved.push('kept');
			})
		];
		await saveAll(5_000);
		expect(saved).toEqual(['kept']);
		off.forEach((stop) => stop());
	});
	it('does not wait for ever', async () => {
		const off = saveBeforeUpdate(() => new Promise<void>(() => undefined));
		const ended = await Promise.race([saveAll(20).then(() => 'went on'), later(3_000).then(() => 'still waiting')]);
		expect(ended).toBe('went on');
		off();
	});
	it('forgets a page that was left', async () => {
		let calls = 0;
		saveBeforeUpdate(() => void (calls += 1))();
		await saveAll(100);
		expect(calls).toBe(0);
	});
});
