import { describe, expect, it } from 'vitest';
import { leadToSetUp } from './lead-to-set-up';

const locals = { person: null, sessionId: null, requestId: 'one' } as unknown as App.Locals;
const go = (path: string) => leadToSetUp({ url: new URL(path, 'https://shop.example'), locals });

describe('somebody who must set up a second factor', () => {
	it.each(['/', '/jobs', '/jobs/4', '/people', '/shop', '/second-factor/else'])(
		'is led there from %s',
		(path) => {
			expect(() => go(path)).toThrow(expect.objectContaining({ status: 303, location: '/second-factor' }));
		}
	);

	it('gets nothing from the API', async () => {
		const answer = go('/api/v1/jobs');
		expect(answer?.status).toBe(403);
		expect(await answer?.json()).toMatchObject({ code: 'not_allowed', id: 'one' });
	});

	it.each(['/second-factor', '/sign-out'])('may open %s', (path) => {
		expect(go(path)).toBeNull();
	});
});
