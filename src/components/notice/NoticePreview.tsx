import { useEffect, useState } from "react";

interface Props {
  api: string;
}

/** The plain text as it will be sent, with a way to the HTML, which opens on its own page under its own policy. */
export function NoticePreview({ api }: Props) {
  const [text, setText] = useState<string | null>(null);

  useEffect(() => {
    const abort = new AbortController();
    const load = async () => {
      const response = await fetch(`${api}/preview.txt`, { signal: abort.signal });
      if (!response.ok) throw new Error(`preview answered ${String(response.status)}`);
      setText(await response.text());
    };
    load().catch(() => {
      if (!abort.signal.aborted) setText("The preview could not be loaded. Save again to try once more.");
    });
    return () => abort.abort();
  }, [api]);

  return (
    <section aria-labelledby="preview">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <h2 id="preview">What will be sent</h2>
        <a className="text-sm" href={`${api}/preview.html`} target="_blank" rel="noopener">
          See it as HTML, in a new window
        </a>
      </div>
      <pre
        className="mt-3 max-h-[36rem] overflow-auto border border-rule bg-raised p-4 font-sans text-sm whitespace-pre-wrap wrap-anywhere"
        tabIndex={0}
      >
        {text ?? "Loading the preview…"}
      </pre>
    </section>
  );
}
