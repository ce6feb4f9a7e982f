'use client';
/** What the reader could not decide, asked in a builder's words; one press answers. Client: it sends the answers. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { CheckboxField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Section } from '@/components/ui/section';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { answerQuestion } from '@/lib/circuits/answer-question';

export interface AskedQuestion {
  readonly id: string;
  readonly sheet: string | null;
  readonly row: number;
  readonly code: string;
  readonly ask: string;
  readonly options: readonly string[];
  readonly designators: readonly string[];
  readonly text: string;
}

export function Questions({
  questions,
  mayAnswer,
}: {
  readonly questions: readonly AskedQuestion[];
  readonly mayAnswer: boolean;
}) {
  return (
    <Section
      title={`${questions.length} ${questions.length === 1 ? 'question' : 'questions'}`}
      remainder="before it can be frozen"
    >
      <ol className="border-t border-ink">
        {questions.map((question) => (
          <Question
            key={question.id}
            question={question}
            alike={questions.filter((other) => other.code === question.code && other.ask === question.ask).length}
            mayAnswer={mayAnswer}
          />
        ))}
      </ol>
    </Section>
  );
}

function Question({
  question,
  alike,
  mayAnswer,
}: {
  readonly question: AskedQuestion;
  readonly alike: number;
  readonly mayAnswer: boolean;
}) {
  const router = useRouter();
  const say = useSay();
  const [own, setOwn] = useState('');
  const [all, setAll] = useState(true);
  const [remember, setRemember] = useState(false);
  const answer = useCommand<typeof answerQuestion>('POST /questions/{questionId}/answer');
  const mayRemember = question.code.includes('taper');

  function send(text: string) {
    answer.mutate(
      { questionId: question.id, answer: text, alike: alike > 1 && all, remember: mayRemember && remember },
      {
        onSuccess: ({ answered, openQuestions }) => {
          say(
            `${answered === 1 ? 'Answered' : `${answered} answered`}; ${openQuestions === 0 ? 'no question is left' : `${openQuestions} left`}`,
          );
          router.refresh();
        },
      },
    );
  }
  function sendOwn(event: FormEvent) {
    event.preventDefault();
    if (own.trim() !== '') send(own.trim());
  }

  return (
    <li className="border-b border-rule py-3">
      <p className="text-small text-soft">
        {question.sheet === null ? '' : `${question.sheet}, `}row {question.row}
        {question.designators.length > 0 ? (
          <span className="font-mono"> · {question.designators.slice(0, 6).join(' ')}</span>
        ) : null}
        {question.text === '' ? null : <span className="font-mono"> · {question.text}</span>}
      </p>
      <p className="mt-0.5 max-w-prose font-semibold">{question.ask}</p>
      {answer.error ? (
        <div className="mt-2">
          <Notice tone="stop" announce>
            {answer.error.details.detail}
          </Notice>
        </div>
      ) : null}
      {mayAnswer ? (
        <div className="mt-2 flex flex-wrap items-end gap-2.5">
          {question.options.map((option) => (
            <Button key={option} busy={answer.isPending} onClick={() => send(option)}>
              <span className="font-mono">{option}</span>
            </Button>
          ))}
          <form onSubmit={sendOwn} className="flex items-end gap-2">
            <div className="w-40">
              <TextField label="Something else" mono value={own} onChange={(event) => setOwn(event.target.value)} />
            </div>
            {own.trim() === '' ? null : (
              <Button type="submit" busy={answer.isPending}>
                Take that
              </Button>
            )}
          </form>
          {alike > 1 ? (
            <CheckboxField
              label={`for all ${alike} that ask this`}
              checked={all}
              onChange={(event) => setAll(event.target.checked)}
            />
          ) : null}
          {mayRemember ? (
            <CheckboxField
              label="always, in this workshop"
              checked={remember}
              onChange={(event) => setRemember(event.target.checked)}
            />
          ) : null}
        </div>
      ) : null}
    </li>
  );
}
