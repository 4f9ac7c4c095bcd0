export * from './types';
export { assessScenario, type AssessOptions } from './assess-scenario';
export { watchUseLimit } from './heat-limits';
export { CLOSE_HEADROOM_K, judgeOutcome, MISSED_SHARE_THAT_COUNTS } from './verdict';
