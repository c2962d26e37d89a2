import { ApiProblem } from '../api-problem.js';

/** A file of this computer that the browser may no longer read. */
export const unreadableFile = (name: string) =>
  new ApiProblem({
    status: 400,
    code: 'file-unreadable',
    title: 'The file cannot be read',
    detail: `${name} was changed, moved or removed on this computer since it was chosen. Choose it again.`,
  });
