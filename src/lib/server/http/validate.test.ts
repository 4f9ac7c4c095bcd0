import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { AppError } from '../errors';
import { pathText, validate } from './validate';

const schema = z.object({ legs: z.array(z.object({ minutes: z.number().max(1440) })) });

describe('input that is not as it should be', () => {
	it('is one coded error that says where and what for every problem', () => {
		const check = () => validate(schema, { legs: [{ minutes: 10 }, { minutes: 2000 }, { minutes: 'long' }] });
		expect(check).toThrow(AppError);
		const error = (() => {
			try {
				check();
			} catch (caught) {
				return caught as AppError;
			}
			throw new Error('was let through');
		})();
		expect(error.code).toBe('invalid_input');
		expect(error.status).toBe(422);
		expect(error.problems.map(({ path }) => path)).toEqual(['legs[1].minutes', 'legs[2].minutes']);
		expect(error.message).toMatch(/^legs\[1\]\.minutes: /);
	});

	it('passes on what is right, parsed', () => {
		expect(validate(z.object({ id: z.coerce.number() }), { id: '7' })).toEqual({ id: 7 });
	});

	it('writes a path as a person would', () => {
		expect(pathText(['bms', 'charge', 0, 'cut'])).toBe('bms.charge[0].cut');
		expect(pathText([])).toBe('');
	});
});
