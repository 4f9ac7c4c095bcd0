import type { ChanceBin } from '../../schemas/accuracy';

export const CALIBRATION_BOX = { width: 340, height: 310, left: 34, right: 14, top: 18, bottom: 40 } as const;

export interface CalibrationDrawing {
	/** Where what is stated is what happens. */
	perfect: string;
	/** Bins with enough installations: the share that was observed, with the range of its interval. */
	points: { x: number; y: number; lowY: number; highY: number; radius: number; count: number }[];
	/** The edges of the bins along the foot. */
	xTicks: { share: number; x: number }[];
	yTicks: { share: number; y: number }[];
}

const TICKS = [0, 0.25, 0.5, 0.75, 1];
const LEAST_RADIUS = 3;
const MOST_RADIUS = 8;

const round = (px: number): number => Math.round(px * 10) / 10;

/** Stated chances across, observed shares upwards; a mark's area goes with how many installations it stands for. */
export function drawCalibration(bins: readonly ChanceBin[]): CalibrationDrawing {
	const { width, height, left, right, top, bottom } = CALIBRATION_BOX;
	const foot = height - bottom;
	const x = (share: number): number => round(left + share * (width - left - right));
	const y = (share: number): number => round(foot - share * (foot - top));
	const most = Math.max(...bins.map(({ installations }) => installations), 1);
	const points = bins.flatMap(({ statedShare, observedShare, installations: count }) =>
		statedShare === null || observedShare === null
			? []
			: [
					{
						...{ x: x(statedShare), y: y(observedShare.value), count },
						...{ lowY: y(observedShare.low), highY: y(observedShare.high) },
						radius: round(Math.max(MOST_RADIUS * Math.sqrt(count / most), LEAST_RADIUS))
					}
				]
	);
	return {
		perfect: `M${x(0)} ${y(0)}L${x(1)} ${y(1)}`,
		points,
		xTicks: TICKS.map((share) => ({ share, x: x(share) })),
		yTicks: TICKS.map((share) => ({ share, y: y(share) }))
	};
}
