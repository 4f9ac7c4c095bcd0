import { describe, expect, it } from 'vitest';
import { runPhases } from './schedule.mjs';

type Phase = { name: string; needs?: string; alone?: boolean };

/** Runs phases that each last a turn of the event loop and writes down who ran beside whom. */
async function watch(phases: Phase[]) {
	const running = new Set<string>();
	const beside: Record<string, string[]> = {};
	const order: string[] = [];
	const results = await runPhases(
		phases.map((phase) => ({ ...phase, work: async () => phase.name })),
		async (phase) => {
			running.add(phase.name);
			for (const each of running) {
				beside[each] = [...new Set([...(beside[each] ?? []), ...running])].filter((name) => name !== each);
			}
			order.push(phase.name);
			await new Promise((resolve) => setTimeout(resolve, 5));
			running.delete(phase.name);
			return phase.work();
		}
	);
	return { results, beside, order };
}

describe('runPhases', () => {
	it('runs every phase once and gives the results in order', async () => {
		const { results } = await watch([{ name: 'a' }, { name: 'b' }, { name: 'c' }]);
		expect(results).toEqual(['a', 'b', 'c']);
	});

	it('runs two beside each other', async () => {
		const { beside } = await watch([{ name: 'a' }, { name: 'b' }]);
		expect(beside.a).toEqual(['b']);
	});

	it('lets nothing run beside one that wants to be alone', async () => {
		const { beside } = await watch([{ name: 'a' }, { name: 'b', alone: true }, { name: 'c' }]);
		expect(beside.b).toEqual([]);
	});

	it('does not begin one before what it needs has ended', async () => {
		const { beside } = await watch([{ name: 'a' }, { name: 'b', needs: 'a' }]);
		expect(beside.b).toEqual([]);
	});
});
