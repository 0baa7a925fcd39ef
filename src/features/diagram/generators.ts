/**
 * Generators on the drawing: pointing at one, or focusing it, marks the vertices and lines that it moves; pressing keeps the mark.
 * Without JavaScript the generators stand as text, and the drawing carries the numbers they speak of.
 */
const figure = document.querySelector<HTMLElement>('[data-diagram]');
const buttons = [...document.querySelectorAll<HTMLButtonElement>('button[data-generator]')];
let kept: HTMLButtonElement | null = null;

function mark(button: HTMLButtonElement | null): void {
  if (!figure) return;
  const vertices = new Set((button?.dataset.vertices ?? '').split(' ').filter(Boolean));
  const lines = new Set((button?.dataset.lines ?? '').split(' ').filter(Boolean));
  figure.classList.toggle('marked', button !== null);
  for (const part of figure.querySelectorAll<SVGElement>('[data-vertex], [data-line]')) {
    const { vertex, line } = part.dataset;
    part.classList.toggle(
      'moved',
      (vertex !== undefined && vertices.has(vertex)) || (line !== undefined && lines.has(line)),
    );
  }
}

for (const button of buttons) {
  button.setAttribute('aria-pressed', 'false');
  button.addEventListener('pointerenter', () => mark(button));
  button.addEventListener('pointerleave', () => mark(kept));
  button.addEventListener('focus', () => mark(button));
  button.addEventListener('blur', () => mark(kept));
  button.addEventListener('click', () => {
    kept = kept === button ? null : button;
    for (const other of buttons) other.setAttribute('aria-pressed', String(other === kept));
    mark(kept);
  });
}
