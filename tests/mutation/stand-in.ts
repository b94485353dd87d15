import { format } from 'node:util';
import { chai, JestAsymmetricMatchers, JestChaiExpect, JestExtend } from '@vitest/expect';

/** One test, as a test file declares it. */
export interface Declared {
  readonly name: string;
  readonly run: () => unknown;
}

chai.use(JestExtend);
chai.use(JestChaiExpect);
chai.use(JestAsymmetricMatchers);
const expect = Object.assign((value: unknown, message?: string) => chai.expect(value, message), chai.expect, {
  unreachable: (message?: string): never => chai.assert.fail(message ?? 'this place was not to be reached'),
});

/**
 * What a test file imports from `vitest`, for tests that run again and again in one process: it keeps the tests in a list
 * instead of running them. Hooks and tests that wait are not for this.
 */
export function standIn(): { readonly api: object; readonly tests: readonly Declared[] } {
  const tests: Declared[] = [];
  const path: string[] = [];
  const titled = (title: string, row: unknown, nth: number): string => {
    const values = Array.isArray(row) ? row : [row];
    const named = title.replace(/\$([\w.]+)/g, (_, key: string) => String((row as Record<string, unknown>)?.[key]));
    return `${format(named, ...values.slice(0, (named.match(/%[sdifjoO]/g) ?? []).length))} #${nth}`;
  };
  type Body = (...values: unknown[]) => unknown;
  const each =
    (one: (name: string, run: () => unknown) => void) => (rows: readonly unknown[]) => (title: string, run: Body) => {
      rows.forEach((row, nth) => {
        one(titled(title, row, nth), () => (Array.isArray(row) ? run(...row) : run(row)));
      });
    };
  const declare = (name: string, run: () => unknown): void => {
    tests.push({ name: [...path, name].join(' > '), run });
  };
  const group = (name: string, body: () => unknown): void => {
    path.push(name);
    body();
    path.pop();
  };
  const nothing = (): void => undefined;
  const test = Object.assign(declare, {
    each: each(declare),
    runIf: (runs: unknown) => (runs ? declare : nothing),
    skipIf: (skips: unknown) => (skips ? nothing : declare),
    skip: nothing,
  });
  const describe = Object.assign(group, {
    each: each(group),
    runIf: (runs: unknown) => (runs ? group : nothing),
    skipIf: (skips: unknown) => (skips ? nothing : group),
    skip: nothing,
  });
  return { api: { describe, test, it: test, expect }, tests };
}
