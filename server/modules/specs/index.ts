export { specRoutes } from './routes.ts';
export { branchSpec, createSpec, putDraft, readSpec } from './spec.service.ts';
export { saveVersion } from './version.service.ts';
export { changeState, lockVersion } from './version-state.service.ts';

export { addNote } from './note.service.ts';
