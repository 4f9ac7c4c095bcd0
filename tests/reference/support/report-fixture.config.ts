import { defineConfig } from 'vitest/config';

/** Runs the one file that the report is tried on, which no project of the application includes. */
export default defineConfig({ test: { include: ['tests/reference/support/report-fixture.ts'] } });
