/** The engine as a browser loads it for a test: everything that the test calls, under one name. */
export { parseScenario, simulateScenario } from '../../src/lib/thermal';
export { spreadDay } from '../../src/lib/thermal/uncertainty';
