/** The workbench before its numbers are there: title block, axes to come, and what is being read. */
import type { Head } from './title/head';

export function Waiting({
  head,
  words,
  retry,
}: {
  readonly head: Head;
  readonly words: string;
  readonly retry?: () => void;
}) {
  return (
    <div className="flex min-h-dvh flex-col">
      <header className="border-frame flex h-[52px] items-center gap-4 border-b-[1.5px] px-5">
        <a href={head.home} className="font-serif text-[18px] leading-6 font-semibold">
          Driftwright
        </a>
        <h1 className="t-value truncate">{head.title}</h1>
      </header>
      {!retry && <div className="bg-ochre h-0.5 w-1/3" aria-hidden="true" />}
      <main id="main" className="px-5 py-6">
        <p role={retry ? 'alert' : 'status'} className={`t-answer ${retry ? 'text-madder' : 'text-ink-2'}`}>
          {words}
        </p>
        {retry && (
          <p className="mt-3 flex gap-4">
            <button type="button" className="button" onClick={retry}>
              Try again
            </button>
          </p>
        )}
        <nav aria-label="Pages of this project" className="t-body mt-8 flex flex-wrap gap-4">
          {head.pages.map(({ id, label, href }) => (
            <a key={id} href={href} className="link">
              {label}
            </a>
          ))}
        </nav>
      </main>
    </div>
  );
}
