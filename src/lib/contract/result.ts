/** The result contract is defined where results are made; everything above the engine takes it from here. */
export type * from '#engine/answer/types.ts';
