import type { RerunProgress, RerunView } from '../schemas/reruns';

/** Why a re-run was begun: "Book 3 came into force". */
export const sayOccasion = ({ bookNumber, occasion }: Pick<RerunView, 'bookNumber' | 'occasion'>): string =>
	`Book ${bookNumber} ${occasion === 'in-force' ? 'came into force' : 'was withdrawn'}`;

const mounts = (count: number): string => (count === 1 ? '1 mount' : `${count} mounts`);

/** "12 of 90 mounts", with what was left out. */
export function sayHowFar({ total, waiting, passedOver, failed }: RerunProgress): string {
	const left = [
		...(passedOver > 0 ? [`${passedOver} passed over`] : []),
		...(failed > 0 ? [`${failed} could not be run`] : [])
	];
	const done = waiting === 0 ? mounts(total) : `${total - waiting} of ${mounts(total)}`;
	return [done, ...left].join(', ');
}

export const RERUN_STATE_WORDS: Record<RerunProgress['state'], string> = {
	running: 'under way',
	cancelled: 'stopped',
	done: 'done'
};

function sayVerdicts({ changed, untold }: RerunProgress): string {
	if (changed === 0) return 'no verdict changed';
	const words = changed === 1 ? '1 verdict changed' : `${changed} verdicts changed`;
	return untold === 0 ? `${words}, everybody told` : `${words}, ${untold} still to be told`;
}

/** "3 verdicts changed, 1 still to be told"; mounts of which nothing is known come first. */
export function sayChanged(progress: RerunProgress): string {
	const { failed, done } = progress;
	const verdicts = sayVerdicts(progress);
	if (failed === 0) return `${verdicts.charAt(0).toUpperCase()}${verdicts.slice(1)}`;
	const left = `${mounts(failed)} could not be run`;
	return done === 0 ? `${left}, so their verdicts are not known` : `${left}; of the others, ${verdicts}`;
}
