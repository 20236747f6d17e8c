/**
 * The page's workers. The address of a script is a matter of trust there: the policy named here is the one that the page's
 * content security policy lets make such addresses, and it makes this one alone.
 */
import address from './trials.worker?worker&url';

/** What of Trusted Types is used here; browsers that have none take the address as it is. */
interface Factory {
  createPolicy(
    name: string,
    rules: { readonly createScriptURL: (text: string) => string },
  ): { createScriptURL(text: string): unknown };
}

let trusted: unknown;

function trustedAddress(): string {
  const { trustedTypes } = globalThis as { readonly trustedTypes?: Factory };
  if (trustedTypes === undefined) return address;
  // A policy of one name can be made once.
  trusted ??= trustedTypes.createPolicy('levelwright-worker', { createScriptURL: () => address }).createScriptURL('');
  return trusted as string;
}

export const makeTrialsWorker = (): Worker => new Worker(trustedAddress(), { type: 'module', name: 'trials' });
