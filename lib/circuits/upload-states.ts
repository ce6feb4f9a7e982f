/** The life of an uploaded parts list as one table. Pure; every other change is a bug. */

export const UPLOAD_STATES = ['received', 'read', 'settled', 'frozen', 'rejected'] as const;
export type UploadState = (typeof UPLOAD_STATES)[number];

export const UPLOAD_ACTS = ['read', 'settle', 'freeze', 'reject', 'try-again', 'read-again'] as const;
export type UploadAct = (typeof UPLOAD_ACTS)[number];

const TRANSITIONS: Readonly<Record<UploadAct, Readonly<Partial<Record<UploadState, UploadState>>>>> = {
  read: { received: 'read' },
  settle: { read: 'settled' },
  // A copy of a frozen revision has the same original.
  freeze: { settled: 'frozen', frozen: 'frozen' },
  reject: { received: 'rejected' },
  'try-again': { received: 'received', rejected: 'received' },
  // With another column role; its questions may be open again.
  'read-again': { read: 'read', settled: 'read', frozen: 'frozen' },
};

/** The state after the act, or null where the act is not possible in that state. */
export function uploadStateAfter(state: UploadState, act: UploadAct): UploadState | null {
  return TRANSITIONS[act][state] ?? null;
}
