import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { defineConfig } from '@playwright/test';

const BROWSERS = ['/usr/bin/chromium-headless-shell', '/usr/bin/chromium'];

/** Debian's Chromium, without what it does in the background. Root needs it without its sandbox. */
const launchOptions = {
	executablePath: BROWSERS.find((path) => existsSync(path)) ?? 'missing',
	args: [
		'--no-sandbox',
		'--disable-gpu',
		'--disable-quic',
		'--no-first-run',
		'--disable-background-networking',
		'--disable-component-update',
		'--disable-sync'
	]
};

/** Runs against an application that is up already; src/cli/test.mjs starts it and says where. */
export default defineConfig({
	testDir: '.',
	outputDir: fileURLToPath(new URL('../../test-results', import.meta.url)),
	workers: 2,
	retries: 0,
	forbidOnly: true,
	timeout: 120_000,
	expect: { timeout: 10_000 },
	use: {
		baseURL: process.env.E2E_BASE_URL,
		locale: 'en-GB',
		actionTimeout: 20_000,
		navigationTimeout: 30_000,
		launchOptions,
		screenshot: 'only-on-failure'
	},
	projects: [
		{ name: 'desk', use: { browserName: 'chromium', viewport: { width: 1280, height: 800 } } },
		{
			name: 'phone',
			grepInvert: /@once/,
			use: {
				browserName: 'chromium',
				viewport: { width: 360, height: 740 },
				isMobile: true,
				hasTouch: true,
				deviceScaleFactor: 2
			}
		}
	]
});
