/** One time slice on paper: the page as it will print in the middle, what is on it to the right, files below. */
import { useDeferredValue, useEffect, useRef, useState } from 'react';
import { sliceHref, sliceSearch, type SliceSettings } from '../address';
import type { KnownPoint } from '../known-points';
import {
  CaptionControls,
  LayerControls,
  MapControls,
  PageControls,
  PathControls,
  VersionControl,
  type Choice,
} from './PrintControls';

export interface PrintDeskProps {
  readonly slug: string;
  readonly version: string;
  readonly settings: SliceSettings;
  readonly frames: readonly Choice[];
  readonly blocks: readonly Choice[];
  readonly oldest_ma: number;
  readonly versions: readonly Choice[];
  /** Of each block that has one. */
  readonly points: Readonly<Record<string, KnownPoint>>;
  /** What the link says and cannot be used, each with why. */
  readonly refused: readonly string[];
}

export type Change = (change: Partial<SliceSettings>) => void;

export default function PrintDesk({
  slug,
  version,
  settings: initial,
  frames,
  blocks,
  oldest_ma,
  versions,
  points,
  refused,
}: PrintDeskProps) {
  const [settings, setSettings] = useState(initial);
  const change: Change = (part) => setSettings((now) => ({ ...now, ...part }));
  const search = sliceSearch(settings, version);
  const settled = useSettled(useDeferredValue(search));
  useEffect(() => history.replaceState(null, '', search), [search]);
  return (
    <div className="grid min-h-[calc(100dvh-52px)] grid-cols-[minmax(0,1fr)_300px] max-lg:grid-cols-1">
      <Preview href={sliceHref(slug, 'svg', settled)} pending={settled !== search} settings={settings} />
      <form
        className="border-frame flex flex-col gap-6 border-l p-5 max-lg:border-t max-lg:border-l-0"
        onSubmit={(e) => e.preventDefault()}
      >
        <h1 className="sr-only">Print a time slice</h1>
        {refused.length > 0 && (
          <div className="wrong" role="alert">
            <p>Left out of the link: {refused.join('; ')}.</p>
          </div>
        )}
        <VersionControl
          version={version}
          versions={versions}
          choose={(other) => window.location.assign(sliceSearch(settings, other))}
        />
        <PageControls settings={settings} change={change} />
        <MapControls settings={settings} change={change} frames={frames} oldest_ma={oldest_ma} />
        <LayerControls settings={settings} change={change} />
        <PathControls settings={settings} change={change} blocks={blocks} points={points} opened={initial} />
        <CaptionControls settings={settings} change={change} />
        <div className="border-frame mt-auto border-t pt-4">
          <div className="flex flex-wrap gap-2">
            <a className="button button-main" href={sliceHref(slug, 'pdf', search)} download>
              Print PDF
            </a>
            {['svg', 'png', 'geojson'].map((format) => (
              <a key={format} className="button" href={sliceHref(slug, format, search)} download>
                {format === 'geojson' ? 'GeoJSON' : format.toUpperCase()}
              </a>
            ))}
          </div>
        </div>
      </form>
    </div>
  );
}

/** The value once it has rested for a moment, so that typing does not draw a page for each key. */
function useSettled(value: string): string {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), 250);
    return () => clearTimeout(timer);
  }, [value]);
  return settled;
}

interface PreviewProps {
  readonly href: string;
  readonly pending: boolean;
  readonly settings: SliceSettings;
}

function Preview({ href, pending, settings }: PreviewProps) {
  const [state, setState] = useState<'drawing' | 'shown' | 'failed'>('drawing');
  const [problem, setProblem] = useState('');
  const image = useRef<HTMLImageElement>(null);
  useEffect(() => {
    // A page that was in the HTML may have been drawn before this ran.
    setState(image.current?.complete && image.current.naturalWidth > 0 ? 'shown' : 'drawing');
  }, [href]);
  const explain = async (): Promise<void> => {
    setState('failed');
    const answer = await fetch(href);
    if (answer.ok) return setState('shown');
    const body = (await answer.json().catch(() => ({}))) as { title?: string; detail?: string };
    setProblem([body.title, body.detail].filter(Boolean).join('. '));
  };
  return (
    <section
      className="bg-sunk flex flex-col items-center justify-center p-8 max-md:p-3"
      aria-label="The page as it will print"
    >
      <p className="t-body text-ink-2 mb-3 h-5" role="status">
        {state === 'failed' ? '' : pending || state === 'drawing' ? 'Drawing …' : ''}
      </p>
      {state === 'failed' ? (
        <p className="wrong" role="alert">
          Not drawn. {problem}
        </p>
      ) : null}
      <img
        ref={image}
        src={href}
        alt={`Time slice at ${settings.age_ma} Ma`}
        className={`border-rule-2 max-h-[78dvh] max-w-full border bg-white ${state === 'failed' ? 'hidden' : ''}`}
        onLoad={() => setState('shown')}
        onError={() => void explain()}
      />
      <p className="t-body text-ink-2 mt-3">
        {settings.paper.toUpperCase()} {settings.orientation}
      </p>
    </section>
  );
}
