import { useRef, useState } from 'react';

interface Props {
  readonly busy: boolean;
  readonly empty: boolean;
  readonly onChoose: (file: File) => void;
}

/** A file by button, by drop, or a table pasted from a spreadsheet. */
export function FilePicker({ busy, empty, onChoose }: Props) {
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const [pasted, setPasted] = useState('');
  const take = (file: File | undefined): void => {
    if (file && !busy) onChoose(file);
  };
  return (
    <div className="grid grid-cols-2 gap-6 max-md:grid-cols-1">
      <div
        className={`flex flex-col items-start justify-center gap-3 border border-dashed p-6 ${over ? 'border-ochre bg-ochre-wash' : 'border-edge'}`}
        onDragOver={(e) => {
          e.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={(e) => {
          e.preventDefault();
          setOver(false);
          take(e.dataTransfer.files[0]);
        }}
      >
        <p className="t-answer">Drop a file here, or choose one.</p>
        <input
          ref={input}
          id="import-choose"
          type="file"
          accept=".geojson,.json,.csv,.tsv,.txt"
          className="sr-only"
          aria-label="File to import"
          onChange={(e) => {
            take(e.target.files?.[0]);
            e.target.value = '';
          }}
        />
        <button className="button" disabled={busy} onClick={() => input.current?.click()}>
          Choose a file …
        </button>
        <p className="t-body text-ink-2">
          {empty
            ? 'Begin with blocks.geojson; rotations come after the blocks they turn.'
            : 'Up to 64 MB. Nothing is written before you have seen it.'}
        </p>
      </div>
      <form
        className="grid gap-2"
        onSubmit={(e) => {
          e.preventDefault();
          take(new File([pasted], 'pasted table.csv', { type: 'text/csv' }));
        }}
      >
        <label className="field">
          <span className="label">Or paste a table with its heading line</span>
          <textarea
            className="input font-mono text-[12px]"
            rows={6}
            value={pasted}
            onChange={(e) => setPasted(e.target.value)}
            placeholder="block,relative_to,age_ma,pole_lat,pole_lon,angle_deg"
          />
        </label>
        <div>
          <button className="button" disabled={busy || pasted.trim() === ''}>
            Read the table
          </button>
        </div>
      </form>
    </div>
  );
}
