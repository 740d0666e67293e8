/** What the content policy must refuse. */
import type { Page } from 'playwright-core';

/** Tries to evaluate text and to reach another origin; gives the rules that refused it, sorted. */
export const tryForbidden = (page: Page): Promise<string[]> =>
  page.evaluate(async () => {
    const refused: string[] = [];
    document.addEventListener('securitypolicyviolation', (event) => void refused.push(event.effectiveDirective));
    await fetch('https://example.org/').catch(() => undefined);
    // Not within the driver's own call: it is allowed to evaluate.
    await new Promise<void>((done) =>
      setTimeout(() => {
        try {
          new Function('return 1')();
        } catch {
          // what the policy is for
        }
        setTimeout(done, 50);
      }),
    );
    return [...new Set(refused)].sort(); // a policy in the page and one in the header both tell
  });
