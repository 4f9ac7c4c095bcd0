/**
 * RODAS, a stiffly accurate and L-stable Rosenbrock method of order 4(3) with six stages.
 *
 *     (C/(γh) − J) uᵢ = H(t + αᵢh, T + Σ aᵢⱼuⱼ) + (C/h) Σ cᵢⱼuⱼ + dᵢ h ∂H/∂t,   T(t + h) = T + Σ mᵢuᵢ
 *
 * Source: Hairer, Wanner, Solving Ordinary Differential Equations II, 2nd ed., section VI.4 (coefficients of the
 * set with γ = 1/4, in the transformed variables that avoid products with the Jacobian).
 */
export const RODAS = {
	gamma: 0.25,
	/** αᵢ: where a stage looks, as a share of the step. */
	times: [0, 0.386, 0.21, 0.63, 1, 1],
	/** dᵢ */
	timeDerivative: [0.25, -0.1043, 0.1035, -0.03620000000000023, 0, 0],
	/** aᵢⱼ; the last stage differs from the one before by that one's own uᵢ, and so does the result from the last. */
	a: [
		[],
		[1.544],
		[0.9466785280815826, 0.2557011698983284],
		[3.314825187068521, 2.896124015972201, 0.9986419139977817],
		[1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895],
		[1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895, 1]
	],
	/** cᵢⱼ */
	c: [
		[],
		[-5.6688],
		[-2.430093356833875, -0.2063599157091915],
		[-0.1073529058151375, -9.594562251023355, -20.47028614809616],
		[7.496443313967647, -10.24680431464352, -33.99990352819905, 11.7089089320616],
		[8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054]
	],
	/** The two inner coefficients of the cubic between the ends of a step. */
	dense: [
		[10.12623508344586, -7.487995877610167, -34.80091861555747, -7.992771707568823, 1.025137723295662],
		[-0.6762803392801253, 6.087714651680015, 16.43084320892478, 24.76722511418386, -6.594389125716872]
	]
} as const;

export const STAGES = RODAS.times.length;
