/** Every use case of this area; lib/registry.ts joins the areas for the API description and the authorisation matrix. */
import type { UseCase } from '@/lib/api/use-case';
import { answerQuestion } from './answer-question';
import { assessPart } from './assess-part';
import { changeCircuit } from './change-circuit';
import { changeColumnRole } from './change-column-role';
import { changeLine } from './change-line';
import { compareRevisions } from './compare-revisions';
import { copyRevision } from './copy-revision';
import { createCircuit } from './create-circuit';
import { createRevision } from './create-revision';
import { decideLine } from './decide-line';
import { dropLine } from './drop-line';
import { exportRevision } from './export-revision';
import { freezeRevision } from './freeze-revision';
import { getCircuit } from './get-circuit';
import { readingOfRevision } from './get-reading';
import { getRevision } from './get-revision';
import { cancelReading, getUpload } from './get-upload';
import { lineCandidates } from './line-candidates';
import { listCircuits } from './list-circuits';
import { listLines } from './list-lines';
import { originalOfRevision, originalOfUpload } from './original-of-revision';
import { standIn } from './stand-in';
import { takeRowAsLine } from './take-row';

export const circuitsUseCases: readonly UseCase[] = [
  createCircuit,
  listCircuits,
  getCircuit,
  changeCircuit,
  createRevision,
  changeColumnRole,
  getRevision,
  readingOfRevision,
  takeRowAsLine,
  freezeRevision,
  copyRevision,
  compareRevisions,
  exportRevision,
  originalOfRevision,
  listLines,
  changeLine,
  dropLine,
  lineCandidates,
  assessPart,
  decideLine,
  answerQuestion,
  getUpload,
  originalOfUpload,
  cancelReading,
  standIn,
];
