/** The process is alive. */
export const GET = (): Response => new Response('alive\n', { headers: { 'content-type': 'text/plain' } });
