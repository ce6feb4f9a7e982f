/** What the upload store remembers of its files and of whom to tell. */
export type StoredFile = {
  key: string;
  name: string;
  size: number;
  type: string;
  customId: string | null;
  isPrivate: boolean;
  disposition: 'inline' | 'attachment';
  /** Bytes here; less than size while an upload was interrupted. */
  received: number;
  fileHash: string | null;
  uploadedAtMs: number | null;
  callback: 'none' | 'waiting' | 'answered' | 'failed' | 'lost';
};

export type Registration = {
  key: string;
  slug: string;
  callbackUrl: string;
  metadata: unknown;
  awaitServerData: boolean;
  atMs: number;
};
export type UploadState = { files: Record<string, StoredFile>; registrations: Record<string, Registration> };
export const emptyUploads = (): UploadState => ({ files: {}, registrations: {} });
