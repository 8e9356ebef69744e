import { readImportJob, runImportJob } from './import-workbook';
import type { Work } from './moment';
import { releaseRunJob } from './release-run';

/** Slow work by kind. Each calls the same operation a button would. */
export const JOB_KINDS: Record<string, Work | undefined> = {
  tuition_run: releaseRunJob,
  read_import: readImportJob,
  run_import: runImportJob,
};
