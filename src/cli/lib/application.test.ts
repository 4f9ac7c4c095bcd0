import { describe, expect, it } from 'vitest';
import { applicationEnv, readLine } from './application.mjs';
import { makeSecrets } from './secrets.mjs';

const parts = {
	host: '127.0.0.1',
	port: 4200,
	secrets: makeSecrets(),
	database: { DATABASE_PORT: '21000' },
	mail: { SMTP_URL: 'smtp://127.0.0.1:21001' },
	files: '/srv/soakline/files'
};

describe('readLine', () => {
	it.each([
		[
			'a step',
			'{"step":"migrations","ms":12,"detail":"4 applied"}',
			{ step: { step: 'migrations', ms: 12, detail: '4 applied' } }
		],
		['a step without a time', '{"step":"ready"}', { step: { step: 'ready', ms: 0, detail: '' } }],
		['the end', '{"fatal":"The database lacks a setting."}', { fatal: 'The database lacks a setting.' }],
		['an entry of the log', '{"level":30}', { entry: '{"level":30}' }],
		['plain words', 'Listening', { plain: 'Listening' }],
		['a bare number', '12', { plain: '12' }]
	])('%s', (_case, line, told) => {
		expect(readLine(line)).toEqual(told);
	});
});

describe('applicationEnv', () => {
	it('keeps photos in the state folder, or where somebody wants them', () => {
		expect(applicationEnv(parts, {}).SOAKLINE_FILES_DIR).toBe('/srv/soakline/files');
		const given = { SOAKLINE_FILES_DIR: '/mnt/photos' };
		expect(applicationEnv(parts, given).SOAKLINE_FILES_DIR).toBe('/mnt/photos');
	});

	it('leads sign-in and forms to the address that people type', () => {
		const env = applicationEnv(parts, {});
		expect(env).toMatchObject({
			ORIGIN: 'http://localhost:4200',
			AUTH_URL: 'http://localhost:4200',
			PORT: '4200'
		});
	});

	it('keeps an address that was set, for sign-in too', () => {
		const env = applicationEnv(parts, { ORIGIN: 'https://soakline.example' });
		expect(env).toMatchObject({ ORIGIN: 'https://soakline.example', AUTH_URL: 'https://soakline.example' });
	});

	it("uses the workshop's own mail server when one was set and none is run here", () => {
		const env = applicationEnv({ ...parts, mail: {} }, { SMTP_URL: 'smtp://mail.example' });
		expect(env.SMTP_URL).toBe('smtp://mail.example');
	});

	it('runs as production unless told otherwise', () => {
		expect(applicationEnv(parts, { NODE_ENV: 'test' }).NODE_ENV).toBe('production');
		expect(applicationEnv({ ...parts, dev: true }, {}).NODE_ENV).toBe('development');
	});

	it('shows the demo workshop unless that was turned off', () => {
		expect(applicationEnv(parts, {}).SOAKLINE_DEMO).toBe('1');
		expect(applicationEnv(parts, { SOAKLINE_DEMO: '0' }).SOAKLINE_DEMO).toBe('0');
	});
});
