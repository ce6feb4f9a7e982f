/** Questions that the workshop has answered once and for all are settled before anybody is asked again. Pure. */
import { applyAnswer } from './apply-answer';
import type { LineDraft, QuestionDraft } from './line-draft';

export interface Standing {
  /** The workshop's setting for a bare taper letter. */
  readonly taperConvention: string;
  /** Answers given to the same rows before, by `row code`; for a list that is read again. */
  readonly earlier?: ReadonlyMap<string, string>;
}

export const questionPlace = (question: {
  readonly sheet: string | null;
  readonly sourceRow: number;
  readonly code: string;
}): string => `${question.sheet ?? ''}\u0000${question.sourceRow}\u0000${question.code}`;

export interface Settled {
  readonly lines: LineDraft[];
  readonly open: QuestionDraft[];
}

export function settleQuestions(
  lines: readonly LineDraft[],
  questions: readonly QuestionDraft[],
  standing: Standing,
): Settled {
  const placeOfLine = new Map(lines.map((line, place) => [`${line.sheet ?? ''}\u0000${line.sourceRow}`, place]));
  const settled = [...lines];
  const open: QuestionDraft[] = [];
  const gone = new Set<number>();
  for (const question of questions) {
    const answer = standing.earlier?.get(questionPlace(question)) ?? standingAnswer(question, standing.taperConvention);
    const place = placeOfLine.get(`${question.sheet ?? ''}\u0000${question.sourceRow}`);
    const line = place === undefined ? undefined : settled[place];
    if (answer === undefined || place === undefined || line === undefined) {
      open.push(question);
      continue;
    }
    const applied = applyAnswer(line, question.code, answer);
    if (!applied.ok) open.push(question);
    else if (applied.line.isPart)
      settled[place] = { ...line, quantity: applied.line.quantity, spec: applied.line.spec };
    else gone.add(place);
  }
  return { lines: gone.size === 0 ? settled : settled.filter((_, place) => !gone.has(place)), open };
}

/** The reader offers today's convention first, the old European one second. */
function standingAnswer({ code, options }: QuestionDraft, convention: string): string | undefined {
  if (code !== 'taper-convention' || convention === 'ask') return undefined;
  return convention === 'letters' ? options[0] : options[1];
}
