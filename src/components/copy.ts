/** Every [data-copy] button copies its text and says so for two seconds. */
function ready(button: HTMLButtonElement): void {
  button.hidden = false;
}

document.querySelectorAll<HTMLButtonElement>('button[data-copy]').forEach(ready);

document.addEventListener('click', async (event) => {
  const button = (event.target as Element).closest<HTMLButtonElement>('button[data-copy]');
  if (!button) return;
  const label = button.dataset.label ?? button.textContent ?? '';
  button.dataset.label = label;
  try {
    await navigator.clipboard.writeText(button.dataset.copy ?? '');
    button.textContent = 'Copied';
  } catch {
    // Without permission the text is at least shown, ready to be selected.
    window.prompt('Copy this text', button.dataset.copy);
  }
  setTimeout(() => {
    button.textContent = label;
  }, 2000);
});
