/** Published laws of heat, air, sun and climate, one file a family; each says where it comes from and where it holds. */
export * from './air';
export * from './forced-convection';
export * from './forced-plate';
export * from './grey-enclosure';
export * from './natural-convection';
export * from './natural-horizontal-plate';
export * from './radiation';
export * from './radiation-shields';
export { EngineInputError } from './require';
export * from './similarity';
export * from './small-linear';
export * from './view-factor-algebra';
export * from './view-factors';
