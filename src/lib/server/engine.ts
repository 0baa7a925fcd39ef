/** The engine as the server sees it: everything comes through its one door. */
export * from './engine-interim.ts';
