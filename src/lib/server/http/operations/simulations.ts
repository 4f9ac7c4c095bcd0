import { scenarioSchema, simulationReportSchema } from '$lib/schemas/simulations';
import { defineOperation } from '../operation';

export const simulationOperations = {
	run: defineOperation({
		id: 'runSimulation',
		method: 'POST',
		path: '/api/v1/simulations',
		action: 'assessments.run',
		summary: 'Runs a scenario and answers as the command line does; stores nothing.',
		body: scenarioSchema,
		answer: simulationReportSchema,
		status: 200
	})
};
