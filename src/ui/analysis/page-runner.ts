/** The page's runner of jobs, made when first wanted and kept: starting workers anew for every panel would take longer than most
 *  runs. */
import { usualRunner, type Runner } from '../../jobs';
import { makeTrialsWorker } from '../../jobs/page-worker';

let runner: Runner | undefined;

export const pageRunner = (): Runner => (runner ??= usualRunner(makeTrialsWorker, navigator.hardwareConcurrency));
