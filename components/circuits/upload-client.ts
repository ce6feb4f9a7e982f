'use client';
/** The browser half of the upload store, typed by our router. Client: it sends files. */
import { generateReactHelpers } from '@uploadthing/react';
import type { PartsListRouter } from '@/lib/services/uploads';

export const { useUploadThing } = generateReactHelpers<PartsListRouter>();
