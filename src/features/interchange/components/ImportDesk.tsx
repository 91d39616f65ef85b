/** Bringing files in: choose, see what would be written and what is wrong, answer what is open, accept. */
import { useRef, useState } from 'react';
import { guessKind, ImportRefused, sendImport } from '../client';
import type { Answers, ColumnMapping, ImportReport } from '../contract';
import { IMPORT_KINDS, type ImportKind } from '../files';
import { ColumnChoice } from './ColumnChoice';
import { FilePicker } from './FilePicker';
import { PreviewTable } from './PreviewTable';
import { Questions } from './Questions';
import { Readings } from './Readings';
import { RejectedTable } from './RejectedTable';

interface Props {
  readonly slug: string;
  /** How many blocks the draft holds: rotations come after them. */
  readonly blocks: number;
}

interface Desk {
  readonly file: File;
  readonly kind: ImportKind;
  readonly answers: Answers;
  readonly mapping: ColumnMapping;
}

const NAMES: Record<ImportKind, string> = {
  blocks: 'blocks.geojson, outlines of blocks and frames',
  rotations: 'rotations.csv, Euler pole sequences',
  features: 'features.geojson, points and lines carried by blocks',
  directions: 'directions.csv, palaeomagnetic sites',
};

export default function ImportDesk({ slug, blocks }: Props) {
  const [desk, setDesk] = useState<Desk | null>(null);
  const [report, setReport] = useState<ImportReport | null>(null);
  const [busy, setBusy] = useState<'reading' | 'writing' | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  const heading = useRef<HTMLHeadingElement>(null);
  // The file chosen last is the one that counts, however late an earlier answer comes.
  const latest = useRef(0);

  async function run(next: Desk, dryRun: boolean, skipRejected = false): Promise<void> {
    const mine = ++latest.current;
    setDesk(next);
    setBusy(dryRun ? 'reading' : 'writing');
    setRefused(null);
    try {
      const read = await sendImport({
        slug,
        ...next,
        dryRun,
        skipRejected,
        previewed: dryRun ? null : (report?.revision ?? null),
      });
      if (mine !== latest.current) return;
      setReport(read);
      heading.current?.focus();
    } catch (error) {
      if (mine !== latest.current) return;
      setRefused(
        error instanceof ImportRefused
          ? error.message
          : dryRun
            ? 'The server did not answer. Nothing was written; try again.'
            : 'The server did not answer. Whether the file was taken is not known: read it again, and rows that are there already say so.',
      );
    } finally {
      if (mine === latest.current) setBusy(null);
    }
  }

  async function choose(file: File): Promise<void> {
    const head = await file.slice(0, 4000).text();
    setReport(null);
    await run({ file, kind: guessKind(file.name, head), answers: {}, mapping: {} }, true);
  }

  const again = (change: Partial<Desk>): void => {
    if (desk) void run({ ...desk, ...change }, true);
  };

  return (
    <div className="mt-6 grid gap-8">
      <FilePicker busy={busy === 'writing'} onChoose={(file) => void choose(file)} empty={blocks === 0} />
      {refused && (
        <p className="wrong" role="alert">
          {refused}
        </p>
      )}
      {desk && (
        <section aria-labelledby="import-file" aria-busy={busy !== null}>
          <div className="border-frame flex flex-wrap items-baseline justify-between gap-3 border-b pb-1">
            <h2 id="import-file" className="t-head" tabIndex={-1} ref={heading}>
              {desk.file.name}
            </h2>
            <label className="t-body text-ink-2">
              read as{' '}
              <select
                className="border-edge text-ink border-b bg-transparent"
                value={desk.kind}
                onChange={(e) => again({ kind: e.target.value as ImportKind, answers: {}, mapping: {} })}
              >
                {IMPORT_KINDS.map((kind) => (
                  <option key={kind} value={kind}>
                    {NAMES[kind]}
                  </option>
                ))}
              </select>
            </label>
          </div>
          <p className="t-body text-ink-2 h-6 pt-1" role="status">
            {busy === 'reading' && 'Reading …'}
            {busy === 'writing' && 'Writing …'}
          </p>
          {report && (
            <Report
              report={report}
              desk={desk}
              busy={busy !== null}
              again={again}
              accept={(skip) => void run(desk, false, skip)}
              slug={slug}
            />
          )}
        </section>
      )}
    </div>
  );
}

interface ReportProps {
  readonly report: ImportReport;
  readonly desk: Desk;
  readonly busy: boolean;
  readonly again: (change: Partial<Desk>) => void;
  readonly accept: (skipRejected: boolean) => void;
  readonly slug: string;
}

function Report({ report, desk, busy, again, accept, slug }: ReportProps) {
  const rejected = report.rejected_rows;
  if (report.written) return <Written report={report} slug={slug} />;
  return (
    <div className="grid gap-8">
      <p className="t-answer">
        <strong>{report.accepted}</strong> {report.accepted === 1 ? 'row' : 'rows'} can be taken
        {rejected > 0 && (
          <>
            , <strong>{rejected}</strong> cannot
          </>
        )}
        {report.questions.length > 0 &&
          `, ${report.questions.length} ${report.questions.length === 1 ? 'question is' : 'questions are'} open`}
        . Nothing is written yet.
      </p>
      {report.notes.length > 0 && (
        <ul className="t-body text-ink-2">
          {report.notes.map((note) => (
            <li key={note}>{note}</li>
          ))}
        </ul>
      )}
      {report.table && report.rejected[0]?.line === 1 && (
        <ColumnChoice
          table={report.table}
          mapping={desk.mapping}
          onChange={(mapping) => again({ mapping })}
        />
      )}
      {report.questions.length > 0 && (
        <Questions
          questions={report.questions}
          busy={busy}
          onAnswer={(answers) => again({ answers: { ...desk.answers, ...answers } })}
        />
      )}
      {report.settled.length > 0 && (
        <Readings
          offers={report.settled}
          busy={busy}
          onAnswer={(answers) => again({ answers: { ...desk.answers, ...answers } })}
        />
      )}
      {rejected > 0 && (
        <RejectedTable rows={report.rejected} beyond={report.rejected_beyond} file={desk.file.name} />
      )}
      {report.preview.length > 0 && <PreviewTable rows={report.preview} accepted={report.accepted} />}
      <div className="border-rule flex flex-wrap items-center gap-3 border-t pt-4">
        {rejected === 0 ? (
          <button
            className="button button-main"
            disabled={busy || report.questions.length > 0 || report.accepted === 0}
            onClick={() => accept(false)}
          >
            Accept {report.accepted} {report.accepted === 1 ? 'row' : 'rows'}
          </button>
        ) : (
          <button
            className="button button-main"
            disabled={busy || report.questions.length > 0 || report.accepted === 0}
            onClick={() => accept(true)}
          >
            Accept {report.accepted}, keep {rejected} to mend
          </button>
        )}
        <span className="t-body text-ink-2">
          {report.questions.length > 0
            ? 'Waits for your answers above.'
            : report.accepted === 0
              ? 'No row of this file can be taken.'
              : 'One step, which undo takes back.'}
        </span>
      </div>
    </div>
  );
}

function Written({ report, slug }: { readonly report: ImportReport; readonly slug: string }) {
  const rejected = report.rejected_rows;
  return (
    <div className="grid gap-4">
      <p className="t-answer" role="status">
        <strong>{report.accepted}</strong> {report.accepted === 1 ? 'row' : 'rows'} written to the draft.
        {rejected > 0 && ` ${rejected} kept aside to mend.`} The file is kept as it came.
      </p>
      <div className="flex flex-wrap gap-3">
        <a className="button button-main" href={`/projects/${slug}/workbench`}>
          Open the workbench
        </a>
        {rejected > 0 && report.import_id && (
          <a className="button" href={`/api/projects/${slug}/imports/${report.import_id}/rejected`} download>
            Rejected rows as a file
          </a>
        )}
      </div>
      {rejected > 0 && (
        <RejectedTable rows={report.rejected} beyond={report.rejected_beyond} file={report.file} />
      )}
    </div>
  );
}
