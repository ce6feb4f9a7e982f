'use client';
/**
 * A parts list becomes a revision: dropped, chosen or pasted. Client: the file goes from the browser to the upload store,
 * with its progress; the server reads it from there. A list that can't be read leaves what was typed as it was.
 */
import { useRouter } from 'next/navigation';
import { type DragEvent, type FormEvent, useId, useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextArea, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { ProgressBar } from '@/components/ui/progress-bar';
import { useCommand } from '@/lib/api/client';
import type { createRevision } from '@/lib/circuits/create-revision';
import { useUploadThing } from './upload-client';

const ACCEPTED = '.csv,.tsv,.txt,.md,.xlsx,text/csv,text/plain,text/markdown,text/tab-separated-values';

export function AddRevision({ circuitId, nextName }: { readonly circuitId: string; readonly nextName: string }) {
  const router = useRouter();
  const fileInput = useRef<HTMLInputElement>(null);
  const fileHint = useId();
  const [name, setName] = useState(nextName);
  const [file, setFile] = useState<File | null>(null);
  const [pasted, setPasted] = useState('');
  const [over, setOver] = useState(false);
  const [percent, setPercent] = useState<number | null>(null);
  const [uploadFailed, setUploadFailed] = useState<string | null>(null);
  const create = useCommand<typeof createRevision>('POST /revisions');
  const { startUpload, isUploading } = useUploadThing('partsList', {
    uploadProgressGranularity: 'fine',
    onUploadProgress: setPercent,
    onUploadError: (error) => setUploadFailed(error.message),
  });
  const busy = isUploading || create.isPending;

  async function submit(event: FormEvent) {
    event.preventDefault();
    setUploadFailed(null);
    create.reset();
    if (file === null && pasted.trim() === '') {
      setUploadFailed('Choose a file or paste a table first.');
      return;
    }
    const source = file === null ? { pasted } : await send(file);
    if (source === null) return;
    create.mutate({ circuitId, name, ...source }, { onSuccess: ({ id }) => router.push(`/revisions/${id}/import`) });
  }

  /** The upload's id, or null where it did not arrive; what was wrong is then on the page. */
  async function send(chosen: File): Promise<{ uploadId: string } | null> {
    setPercent(0);
    const answer = await startUpload([chosen], { circuitId }).catch((error: unknown) => {
      setUploadFailed(error instanceof Error ? error.message : 'The file did not arrive.');
      return undefined;
    });
    setPercent(null);
    const told = answer?.[0]?.serverData;
    if (!told) {
      setUploadFailed((before) => before ?? 'The file did not arrive. Nothing was changed; send it again.');
      return null;
    }
    if (!told.ok) {
      setUploadFailed(told.message);
      return null;
    }
    return { uploadId: told.uploadId };
  }

  function drop(event: DragEvent) {
    event.preventDefault();
    setOver(false);
    const dropped = event.dataTransfer.files[0];
    if (dropped) setFile(dropped);
  }

  const problem = create.error?.details;
  return (
    <form onSubmit={submit} className="flex max-w-[46rem] flex-col gap-4">
      {problem ? (
        <Notice tone="stop" announce title={problem.title}>
          {problem.detail}
        </Notice>
      ) : null}
      {uploadFailed === null ? null : (
        <Notice tone="stop" announce title="The list was not sent">
          {uploadFailed}
        </Notice>
      )}
      <div className="max-w-[14rem]">
        <TextField
          label="Name of the revision"
          required
          maxLength={60}
          value={name}
          onChange={(event) => setName(event.target.value)}
        />
      </div>
      <div
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
        className={`flex flex-wrap items-center gap-x-4 gap-y-2 border border-dashed px-4 py-5 ${over ? 'border-copper bg-copper-wash' : 'border-edge bg-sheet'}`}
      >
        <input
          ref={fileInput}
          type="file"
          accept={ACCEPTED}
          aria-label="Parts list file"
          aria-describedby={fileHint}
          className="sr-only"
          onChange={(event) => setFile(event.target.files?.[0] ?? null)}
        />
        <Button onClick={() => fileInput.current?.click()}>Choose a file</Button>
        <p id={fileHint} className="min-w-0 flex-1 text-soft">
          {file === null ? (
            'or drop the list here: XLSX, CSV, TSV, Markdown or text, as it is'
          ) : (
            <>
              <span className="font-mono break-all text-ink">{file.name}</span> ({sizeText(file.size)})
            </>
          )}
        </p>
        {file === null ? null : (
          <Button
            kind="quiet"
            size="small"
            onClick={() => {
              setFile(null);
              if (fileInput.current) fileInput.current.value = '';
            }}
          >
            Take it away
          </Button>
        )}
      </div>
      {file === null ? (
        <TextArea
          label="Or paste a table"
          optional
          mono
          rows={5}
          hint="Straight from a spreadsheet or a page: columns may be apart by tabs, commas or bars."
          value={pasted}
          onChange={(event) => setPasted(event.target.value)}
        />
      ) : null}
      {percent === null ? null : <ProgressBar label="Sending the file" done={percent} total={100} unit="percent" />}
      <div>
        <Button type="submit" kind="primary" busy={busy} busyWord={isUploading ? 'Sending …' : 'Reading …'}>
          Read the list
        </Button>
      </div>
    </form>
  );
}

function sizeText(bytes: number): string {
  return bytes < 1_000_000 ? `${Math.max(1, Math.round(bytes / 1_000))} kB` : `${(bytes / 1_000_000).toFixed(1)} MB`;
}
