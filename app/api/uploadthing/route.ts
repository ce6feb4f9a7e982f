import type { NextRequest } from 'next/server';
import { uploadCalls } from '@/lib/circuits/receive-upload';
import { uploadHandlers } from '@/lib/services/uploads';

// Made at the first request: the SDK reads its configuration then, and a build has none.
let handlers: ReturnType<typeof uploadHandlers> | undefined;
const made = () => (handlers ??= uploadHandlers(uploadCalls));

export const GET = (request: NextRequest): Promise<Response> => made().GET(request);
export const POST = (request: NextRequest): Promise<Response> => made().POST(request);
