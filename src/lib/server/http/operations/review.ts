import {
	reviewFilterSchema,
	reviewListQuerySchema,
	reviewMapSchema,
	reviewPageSchema,
	reviewScopeSchema,
	reviewTrendsSchema,
	reviewZonesSchema
} from '$lib/schemas/review';
import { defineOperation } from '../operation';

export const reviewOperations = {
	zones: defineOperation({
		id: 'reviewZones',
		method: 'GET',
		path: '/api/v1/review/zones',
		action: 'review.read',
		summary:
			'What has been fitted, zone by zone: verdicts, dark days predicted and reported with an exact Poisson interval on their ratio, overdue looks, overrides, sheets.',
		query: reviewFilterSchema,
		answer: reviewZonesSchema,
		status: 200
	}),
	installations: defineOperation({
		id: 'listReviewInstallations',
		method: 'GET',
		path: '/api/v1/review/installations',
		action: 'review.read',
		summary: 'The installations behind the figures, a page at a time.',
		query: reviewListQuerySchema,
		answer: reviewPageSchema,
		status: 200
	}),
	trends: defineOperation({
		id: 'reviewTrends',
		method: 'GET',
		path: '/api/v1/review/trends',
		action: 'review.read',
		summary: 'Month by month: what was fitted, and the dark days predicted and reported.',
		query: reviewScopeSchema,
		answer: reviewTrendsSchema,
		status: 200
	}),
	map: defineOperation({
		id: 'reviewMap',
		method: 'GET',
		path: '/api/v1/review/map',
		action: 'review.read',
		summary: 'Where the installations tour, place by place.',
		query: reviewFilterSchema,
		answer: reviewMapSchema,
		status: 200
	})
};
