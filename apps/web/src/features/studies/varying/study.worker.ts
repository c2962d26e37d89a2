import { seekGoal, type GoalOutcome, type GoalWork } from './goal-work.js';
import { spreadOf, type SpreadOutcome, type SpreadWork } from './spread-work.js';

export type StudyWork = SpreadWork | GoalWork;
export type StudyOutcome = SpreadOutcome | GoalOutcome;

/** What comes back: how far it is, the outcome, or why there is none. */
export type StudyReply = { progress: number } | { outcome: StudyOutcome } | { fault: string };

addEventListener('message', ({ data }: MessageEvent<StudyWork>) => {
  const reply = (message: StudyReply) => postMessage(message);
  const onProgress = (progress: number) => reply({ progress });
  try {
    reply({ outcome: data.kind === 'spread' ? spreadOf(data, onProgress) : seekGoal(data, onProgress) });
  } catch (error) {
    reply({ fault: error instanceof Error ? error.message : String(error) });
  }
});
