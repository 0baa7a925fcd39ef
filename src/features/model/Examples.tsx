import { type Example, examples } from './examples.ts';

/** One click puts a worked example into the editor; without JavaScript each is a link to the same. */
export function Examples({ onChoose }: { readonly onChoose: (example: Example) => void }) {
  return (
    <ul className="examples" aria-label="Worked examples">
      {examples.map((example) => (
        <li key={example.id}>
          <a
            className="chip"
            href={`/models/new?example=${example.id}`}
            title={example.note}
            onClick={(event) => {
              if (event.metaKey || event.ctrlKey || event.shiftKey) return;
              event.preventDefault();
              onChoose(example);
            }}
          >
            {example.title}
          </a>
        </li>
      ))}
    </ul>
  );
}
