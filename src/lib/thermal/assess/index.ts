export * from './types';
export {
	assessScenario,
	CLOSE_HEADROOM_K,
	MISSED_SHARE_THAT_COUNTS,
	type AssessOptions
} from './assess-scenario';
