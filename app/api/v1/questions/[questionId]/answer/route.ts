import { route } from '@/lib/api/route';
import { answerQuestion } from '@/lib/circuits/answer-question';

export const POST = route(answerQuestion);
