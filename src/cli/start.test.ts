import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const folder = fileURLToPath(new URL('.', import.meta.url));

function runStart(env: Record<string, string>) {
	return spawnSync(process.execPath, [join(folder, 'start.mjs')], {
		env: { ...process.env, ...env },
		encoding: 'utf8'
	});
}

describe('start', () => {
	it('refuses a port that is none with one sentence, before it does anything', () => {
		const { status, stdout, stderr } = runStart({ PORT: 'seven' });
		expect(status).toBe(1);
		expect(stdout).toBe('');
		expect(stderr.trim()).toBe('PORT is "seven": it has to be a whole number from 1 to 65535.');
	});

	it.each(['start.mjs', 'test.mjs'])(
		'%s runs before anything is installed: it leads to Node modules only',
		(program) => {
			const seen = new Set<string>();
			const foreign: string[] = [];
			const follow = (file: string) => {
				if (seen.has(file)) return;
				seen.add(file);
				const source = readFileSync(file, 'utf8');
				for (const [, from = ''] of source.matchAll(/^(?:import|\} from)[^'"]*['"]([^'"]+)['"]/gm)) {
					if (from.startsWith('.')) follow(join(file, '..', from));
					else if (!from.startsWith('node:')) foreign.push(`${file}: ${from}`);
				}
			};
			follow(join(folder, program));
			expect(foreign).toEqual([]);
			expect(seen.size).toBeGreaterThan(10);
		}
	);
});
