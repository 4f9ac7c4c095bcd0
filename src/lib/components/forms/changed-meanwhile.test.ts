import { describe, expect, it } from 'vitest';
import { findChanges } from './changed-meanwhile';

const LABELS = { name: 'Name', towed: 'Towing' };

describe('a record that somebody else saved meanwhile', () => {
	it('is told field by field, mine beside what was saved', () => {
		const changes = findChanges(
			{ version: '3', name: 'Ash Ridge', towed: true },
			{ version: '4', name: '', towed: false },
			LABELS
		);
		expect(changes).toEqual([
			{ label: 'Name', mine: 'Ash Ridge', now: 'nothing' },
			{ label: 'Towing', mine: 'yes', now: 'no' }
		]);
	});

	it('may say the same as mine: then nothing differs, but it was saved all the same', () => {
		expect(findChanges({ version: '3', name: 'A' }, { version: '4', name: 'A' }, LABELS)).toEqual([]);
	});

	it('is no matter while the version is the one that was seen', () => {
		expect(findChanges({ version: '3', name: 'A' }, { version: '3', name: 'B' }, LABELS)).toBeNull();
		expect(findChanges({ version: '3', name: 'A' }, undefined, LABELS)).toBeNull();
	});
});
