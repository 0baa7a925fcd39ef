/** The part of the computer algebra system that symbolic.ts uses: one global workspace, text in, text out. */
declare module 'algebrite' {
  const algebrite: { run(script: string): string };
  export default algebrite;
}
