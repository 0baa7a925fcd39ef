/**
 * The live example without a reload: the form's question goes to the page itself, and the answer's part of the reply
 * takes the place of the old one. Without this script the form does the same by a reload.
 */
const form = document.querySelector<HTMLFormElement>('#question');
const answer = document.querySelector<HTMLElement>('#answer');
let pending: AbortController | null = null;

async function ask(form: HTMLFormElement, answer: HTMLElement): Promise<void> {
  pending?.abort();
  pending = new AbortController();
  const query = new URLSearchParams([...new FormData(form)].map(([name, value]) => [name, String(value)]));
  const address = `/?${query}`;
  answer.setAttribute('aria-busy', 'true');
  try {
    const reply = await fetch(address, { signal: pending.signal });
    const page = new DOMParser().parseFromString(await reply.text(), 'text/html');
    const fresh = page.querySelector('#answer');
    if (!fresh) throw new Error('no answer in the reply');
    answer.replaceChildren(...fresh.childNodes);
    history.replaceState(null, '', `${address}#question`);
    answer.removeAttribute('aria-busy');
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') return;
    form.submit();
  }
}

if (form && answer) {
  form.addEventListener('submit', (event) => {
    event.preventDefault();
    void ask(form, answer);
  });
  form.addEventListener('change', (event) => {
    if ((event.target as HTMLElement).matches('input[type=radio], select, input[type=number]')) void ask(form, answer);
  });
}
