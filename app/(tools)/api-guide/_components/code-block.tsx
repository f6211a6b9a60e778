/** Text for a terminal or a program; scrolls sideways by itself and can be reached by keyboard. */
export function CodeBlock({ label, children }: { label: string; children: string }) {
  return (
    <figure className="min-w-0">
      <figcaption className="mb-1 text-12 font-semibold text-ink-soft">{label}</figcaption>
      <pre
        className="max-h-96 overflow-auto border border-rule bg-sheet p-3 font-mono text-12"
        tabIndex={0}
        role="region"
        aria-label={label}
      >
        {children}
      </pre>
    </figure>
  );
}
