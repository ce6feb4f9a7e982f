import { uploadCalls } from '@/lib/circuits/receive-upload';
import { uploadHandlers } from '@/lib/services/uploads';

export const { GET, POST } = uploadHandlers(uploadCalls);
