import type { ExpansionEvent } from '#contract/api.ts';

/** Follows a computation's events: meter and count as they come, the whole page when it ends or the first diagrams are there. */
const panel = document.querySelector<HTMLElement>('[data-follow]');
const meter = panel?.querySelector('progress');
const words = panel?.querySelector<HTMLElement>('[data-progress]');
const started = Date.now();
/** A job that is over in a moment is shown whole at once; a long one shows its first diagrams once. */
const FIRST_LOOK_MS = 4_000;
let looked = sessionStorage.getItem('looked') === panel?.dataset.follow;

function show(event: ExpansionEvent): void {
  if (event.type === 'state') {
    if (event.state !== 'queued' && event.state !== 'running') location.reload();
    return;
  }
  if (event.type === 'diagrams') window.dispatchEvent(new Event('wickwork:diagrams'));
  if (event.type === 'progress') {
    const { classes, estimated, fraction, phase } = event.progress;
    if (meter && fraction !== null) meter.value = fraction;
    const of = estimated ? ` of about ${estimated.toLocaleString('en-GB')}` : '';
    if (words) words.textContent = `${classes.toLocaleString('en-GB')} diagrams${of} · ${phase}`;
    if (!looked && classes > 0 && Date.now() - started > FIRST_LOOK_MS) {
      looked = true;
      sessionStorage.setItem('looked', panel?.dataset.follow ?? '');
      location.reload();
    }
  }
}

if (panel) {
  const events = new EventSource(`/api/v1/expansions/${panel.dataset.follow}/events`);
  for (const type of ['progress', 'state', 'diagrams'])
    events.addEventListener(type, (message) => show(JSON.parse((message as MessageEvent<string>).data)));
  events.onmessage = (message) => show(JSON.parse(message.data as string));
}
