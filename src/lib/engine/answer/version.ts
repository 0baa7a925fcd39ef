import type { EngineStamp } from './types.ts';

/** Raised whenever any stored result could come out differently: stored expansions are bound to it and never change. */
export const ENGINE_VERSION = '1.0.0';

export const ENGINE: EngineStamp = { name: 'Wickwork', version: ENGINE_VERSION };
