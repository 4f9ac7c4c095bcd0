// The package's own index of adapters loads a dozen validators; this is the one that we use.
export { zod as zod4 } from '../../../../node_modules/sveltekit-superforms/dist/adapters/zod4.js';
