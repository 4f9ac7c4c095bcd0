import type { Window } from '$lib/components/charts/trace-plot/plot-drawing';
import type { TraceChannel } from '$lib/thermal/traces';

/** The address of a trace's page with another window, or other channels: so that a zoom needs no script and can be sent on. */
export function windowHref(
	traceId: number,
	window: Window | null,
	channels: readonly TraceChannel[] | null
): string {
	const query = [
		...(window ? [`from=${window.fromS}`, `to=${window.toS}`] : []),
		...(channels ?? []).map((channel) => `show=${channel}`)
	];
	return `/traces/${traceId}${query.length > 0 ? `?${query.join('&')}` : ''}#plot`;
}
