/// <reference lib="webworker" />
import { PlanningDesk } from './answer-question';
import type { Question } from './protocol';

const desk = new PlanningDesk();

addEventListener('message', ({ data }: MessageEvent<Question>) => postMessage(desk.answer(data)));
