import { mkdtemp, rm } from 'node:fs/promises';
import { createServer, type AddressInfo, type Server } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import {
	addressSentence,
	chooseFreePort,
	heldPorts,
	parsePort,
	rememberedPorts,
	requireFreeAddress
} from './ports.mjs';

let other: Server;
let taken: number;

beforeEach(async () => {
	other = createServer();
	await new Promise<void>((resolve) => other.listen(0, '127.0.0.1', resolve));
	taken = (other.address() as AddressInfo).port;
});

afterEach(() => {
	other.close();
});

describe('parsePort', () => {
	it.each([
		[undefined, 4173],
		['', 4173],
		['8080', 8080],
		['65535', 65_535]
	])('reads %s as %d', (words, port) => {
		expect(parsePort(words)).toBe(port);
	});

	it.each(['0', '65536', '-1', '80.5', 'http', '1e3'])('refuses %s and says the limits', (words) => {
		expect(() => parsePort(words)).toThrow(
			`PORT is "${words}": it has to be a whole number from 1 to 65535.`
		);
	});
});

describe('requireFreeAddress', () => {
	it('refuses a port that another program has', async () => {
		await expect(requireFreeAddress(taken, '127.0.0.1')).rejects.toThrow(
			`Port ${taken} on 127.0.0.1 is in use by another program`
		);
	});

	it('lets a free one through', async () => {
		await expect(requireFreeAddress(await chooseFreePort(), '127.0.0.1')).resolves.toBeUndefined();
	});
});

describe('addressSentence', () => {
	it.each([
		['EADDRINUSE', /in use.*PORT=4174/],
		['EACCES', /may not listen on port 4173/],
		['EADDRNOTAVAIL', /no address "127.0.0.1"/],
		['EOTHER', /EOTHER/]
	])('%s', (code, sentence) => {
		expect(addressSentence(code, 4173, '127.0.0.1')).toMatch(sentence);
	});
});

describe('chooseFreePort', () => {
	it('passes over what is not free', async () => {
		let asked = 0;
		await chooseFreePort([], async () => ++asked === 5);
		expect(asked).toBe(5);
	});

	it('says so when there is none', async () => {
		await expect(chooseFreePort([], async () => false)).rejects.toThrow(/No free port/);
	});
});

describe('rememberedPorts', () => {
	it('gives the same ports again, and another when somebody has taken one', async () => {
		const folder = await mkdtemp(join(tmpdir(), 'ports-'));
		try {
			const first = await rememberedPorts(folder);
			expect(await rememberedPorts(folder)).toEqual(first);
			const squatter = createServer();
			await new Promise<void>((resolve) => squatter.listen(first.database, '127.0.0.1', resolve));
			const second = await rememberedPorts(folder);
			squatter.close();
			expect(second.database).not.toBe(first.database);
			expect(second.mail).toBe(first.mail);
		} finally {
			await rm(folder, { recursive: true });
		}
	});
});

describe('heldPorts', () => {
	let folder: string;

	beforeEach(async () => {
		folder = await mkdtemp(join(tmpdir(), 'ports-'));
	});

	afterEach(async () => {
		await rm(folder, { recursive: true });
	});

	it('are those that a running start listens on, and stay written down', async () => {
		const running = await rememberedPorts(folder);
		const database = createServer();
		await new Promise<void>((resolve) => database.listen(running.database, '127.0.0.1', resolve));
		try {
			expect(await heldPorts(folder)).toEqual(running);
			expect(await heldPorts(folder)).toEqual(running);
		} finally {
			database.close();
		}
	});

	it('are refused where nothing was ever started', async () => {
		await expect(heldPorts(folder)).rejects.toThrow('Nothing was ever started here.');
	});
});
