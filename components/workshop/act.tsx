'use client';
/**
 * One act on one thing: a button, where needed a short question before (a reason, a number, a name), the server's answer
 * after. Client: it sends the command and shows what came of it. What is on the page stays where the act is refused.
 */
import { useRouter } from 'next/navigation';
import { type FormEvent, useId, useState } from 'react';
import type { z } from 'zod';
import { Button, type ButtonKind, type ButtonSize } from '@/components/ui/button';
import { Dialog, DialogClose } from '@/components/ui/dialog';
import { NumberField, TextArea, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { UseCase } from '@/lib/api/use-case';

export interface ActQuestion {
  /** The input's field that takes the answer. */
  readonly field: string;
  readonly label: string;
  readonly hint?: string;
  readonly kind?: 'words' | 'line' | 'number' | 'day';
  readonly initial?: string;
  readonly optional?: boolean;
}

export interface ActProps<U extends UseCase> {
  readonly endpoint: U['http'];
  /** All of the input but what the questions add. */
  readonly input: Partial<z.input<U['input']>>;
  readonly word: string;
  readonly busyWord?: string;
  readonly kind?: ButtonKind;
  readonly size?: ButtonSize;
  readonly wide?: boolean;
  /** What the status line says when it is done. */
  readonly said?: string;
  /** Where to go when it is done; `{name}` takes a field of the answer. Left out, the page is read again. */
  readonly go?: string;
  /** Asked before; with `title` and no questions it only asks to be sure. */
  readonly questions?: readonly ActQuestion[];
  readonly title?: string;
  readonly text?: string;
}

export function Act<U extends UseCase>({
  endpoint,
  input,
  word,
  busyWord,
  kind = 'secondary',
  size = 'normal',
  wide = false,
  said,
  go,
  questions = [],
  title,
  text,
}: ActProps<U>) {
  const router = useRouter();
  const say = useSay();
  const [open, setOpen] = useState(false);
  const [answers, setAnswers] = useState<Readonly<Record<string, string>>>(() =>
    Object.fromEntries(questions.map((one) => [one.field, one.initial ?? ''])),
  );
  const formId = useId();
  const command = useCommand<U>(endpoint);
  const asks = questions.length > 0 || title !== undefined;
  const problem = command.error?.details;
  const busyProps = busyWord === undefined ? {} : { busyWord };

  function send() {
    const answered = Object.fromEntries(
      questions
        .filter((one) => (answers[one.field] ?? '') !== '')
        .map((one) => [one.field, one.kind === 'number' ? Number(answers[one.field]) : answers[one.field]]),
    );
    command.mutate({ ...input, ...answered } as z.input<U['input']>, {
      onSuccess: (answer) => {
        setOpen(false);
        if (said !== undefined) say(said);
        if (go === undefined) router.refresh();
        else router.push(filled(go, answer));
      },
    });
  }
  function submit(event: FormEvent) {
    event.preventDefault();
    send();
  }

  const refused = problem ? (
    <Notice tone="stop" announce title={problem.title}>
      {problem.detail}
    </Notice>
  ) : null;

  if (!asks) {
    return (
      <>
        <Button kind={kind} size={size} wide={wide} busy={command.isPending} {...busyProps} onClick={send}>
          {word}
        </Button>
        {refused === null ? null : <div className="basis-full">{refused}</div>}
      </>
    );
  }
  return (
    <Dialog
      title={title ?? word}
      {...(text === undefined ? {} : { description: text })}
      open={open}
      onOpenChange={(next) => {
        setOpen(next);
        if (next) command.reset();
      }}
      trigger={
        <Button kind={kind} size={size} wide={wide}>
          {word}
        </Button>
      }
      actions={
        <>
          <DialogClose>
            <Button kind="quiet">Leave it</Button>
          </DialogClose>
          <Button
            type="submit"
            form={formId}
            kind={kind === 'danger' ? 'danger' : 'primary'}
            busy={command.isPending}
            {...busyProps}
          >
            {word}
          </Button>
        </>
      }
    >
      <form id={formId} onSubmit={submit} className="flex flex-col gap-4">
        {refused}
        {questions.map((one) => {
          const common = {
            label: one.label,
            value: answers[one.field] ?? '',
            required: one.optional !== true,
            ...(one.optional ? { optional: true } : {}),
            ...(one.hint === undefined ? {} : { hint: one.hint }),
          };
          const put = (value: string) => setAnswers((before) => ({ ...before, [one.field]: value }));
          if (one.kind === 'number')
            return <NumberField key={one.field} {...common} onChange={(event) => put(event.target.value)} />;
          if (one.kind === 'day')
            return <TextField key={one.field} type="date" {...common} onChange={(event) => put(event.target.value)} />;
          if (one.kind === 'line')
            return <TextField key={one.field} {...common} onChange={(event) => put(event.target.value)} />;
          return <TextArea key={one.field} rows={3} {...common} onChange={(event) => put(event.target.value)} />;
        })}
      </form>
    </Dialog>
  );
}

function filled(template: string, answer: unknown): string {
  const fields = answer !== null && typeof answer === 'object' ? (answer as Record<string, unknown>) : {};
  return template.replace(/\{(\w+)\}/g, (_, name: string) => encodeURIComponent(String(fields[name] ?? '')));
}
