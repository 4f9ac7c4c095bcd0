import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { env } from '../env';
import { getLetter, listLetters } from './mailbox';

useTestDatabase();

describe('outside of a demonstration', () => {
	it('there is no mailbox for anybody, although a folder with letters is there', async () => {
		const crew = await makeCrew();
		expect(env()).toMatchObject({ SOAKLINE_DEMO: '0', MAILBOX_DIR: expect.any(String) });
		for (const person of [crew.installer, crew.engineer, crew.manager]) {
			await expect(listLetters(person)).rejects.toMatchObject({ code: 'not_found' });
			await expect(getLetter(person, 'any')).rejects.toMatchObject({ code: 'not_found' });
		}
	});
});
