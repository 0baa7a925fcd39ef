import { type ReactNode, useState } from 'react';

/** MathML made by the server. It never holds text of another origin than our own typesetter. */
export function Formula({ html, className }: { html: string; className?: string }) {
  // biome-ignore lint/security/noDangerouslySetInnerHtml: markup of our own typesetter, which escapes what it is given
  return <span className={className} dangerouslySetInnerHTML={{ __html: html }} />;
}

/** Copies a text and says so for two seconds. */
export function Copy({ text, what, label = 'Copy LaTeX' }: { text: string; what: string; label?: string }) {
  const [said, setSaid] = useState(label);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      setSaid('Copied');
    } catch {
      setSaid('Copying was refused');
    }
    setTimeout(() => setSaid(label), 2000);
  };
  return (
    <button type="button" className="btn btn-small btn-quiet" onClick={copy} aria-label={`${said}: ${what}`}>
      {said}
    </button>
  );
}

export function Panel({ title, aside, children }: { title: string; aside?: ReactNode; children: ReactNode }) {
  return (
    <section className="panel">
      <div className="panel-head">
        <h2 className="eyebrow">{title}</h2>
        {aside}
      </div>
      {children}
    </section>
  );
}
