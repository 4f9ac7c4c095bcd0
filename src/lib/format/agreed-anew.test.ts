import { describe, expect, it } from 'vitest';
import { NOT_PROPOSED, type AgreedItem } from '../schemas/fitting';
import { compareAnew, NOT_NOTED } from './agreed-anew';

const item = (key: string, agreed: string): AgreedItem => ({ key, label: key, agreed });
const BEFORE = [item('battery', 'Ridge 100'), item('charger', 'at most 50 A'), item('fuse', NOT_PROPOSED)];
const NOW = [item('battery', 'Ridge 65'), item('charger', 'at most 40 A'), item('fuse', '80 A')];

describe('what is otherwise once another agreement holds', () => {
	it('is no longer what is agreed now, however it was spaced and written', () => {
		const differences = [{ key: 'battery' as const, fitted: ' ridge  65' }];
		expect(compareAnew([BEFORE[0]!], [NOW[0]!], differences)).toEqual([]);
	});

	it('is still what was named in other words: that is for whoever noted it', () => {
		const differences = [{ key: 'battery' as const, fitted: 'The 65 Ah one' }];
		expect(compareAnew([BEFORE[0]!], [NOW[0]!], differences)).toEqual(differences);
	});

	it('is what was as agreed before, where the agreement changed; what nobody noted is not claimed', () => {
		expect(compareAnew(BEFORE, NOW, [])).toEqual([
			{ key: 'battery', fitted: 'Ridge 100' },
			{ key: 'fuse', fitted: NOT_NOTED },
			{ key: 'charger', fitted: 'at most 50 A' }
		]);
	});

	it('is the same as at first after there and back', () => {
		const differences = [{ key: 'battery' as const, fitted: 'Ridge 65' }];
		const there = compareAnew(BEFORE, NOW, differences);
		expect(there.map(({ key }) => key)).toEqual(['fuse', 'charger']);
		expect(compareAnew(NOW, BEFORE, there)).toEqual(differences);
	});

	it('leaves the place of a mount alone, whose name may have changed', () => {
		expect(compareAnew([item('position', 'A: Front')], [item('position', 'A: Front left')], [])).toEqual([]);
	});
});
