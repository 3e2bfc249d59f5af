import type { Page } from 'playwright-core';

export interface Watched {
  /** Whatever went wrong in the page so far, but for what was expected. */
  faults(): readonly string[];
  /** Says beforehand that this may go wrong: a text that the fault contains. */
  expect(text: string): void;
}

/** Keeps account of console errors, page errors, violations of the content security policy, and failed requests. */
export async function watch(page: Page): Promise<Watched> {
  const faults: string[] = [];
  const expected: string[] = [];
  const tell = (fault: string) => faults.push(`${new URL(page.url(), 'http://none').pathname}: ${fault}`);
  page.on('console', (message) => {
    if (message.type() !== 'error' && message.type() !== 'warning') return;
    tell(`console ${message.type()}: ${message.text()} (${message.location().url})`);
  });
  page.on('pageerror', (error) => tell(`page error: ${error.message}`));
  page.on('requestfailed', (request) => {
    const reason = request.failure()?.errorText ?? 'no reason';
    // The page itself gave this one up: it was left, or asks for something newer.
    if (reason === 'net::ERR_ABORTED') return;
    tell(`request failed: ${request.method()} ${request.url()}: ${reason}`);
  });
  page.on('response', (response) => {
    if (response.status() >= 400)
      tell(`answer ${response.status()}: ${response.request().method()} ${response.url()}`);
  });
  await page.exposeFunction('tellOfViolation', (text: string) => tell(`content security policy: ${text}`));
  await page.addInitScript(() => {
    document.addEventListener('securitypolicyviolation', (event) => {
      const told = (window as unknown as { tellOfViolation: (text: string) => void }).tellOfViolation;
      told(`${event.violatedDirective} ${event.blockedURI} ${event.sourceFile}:${event.lineNumber}`);
    });
  });
  return {
    faults: () => faults.filter((fault) => !expected.some((text) => fault.includes(text))),
    expect: (text) => void expected.push(text),
  };
}
