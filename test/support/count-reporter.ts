import type { Reporter, SerializedError, TestModule, Vitest } from 'vitest/node';

/**
 * Prints `N passed, N failed` as the very last line of a run. A skipped or empty test proves nothing and counts as failed,
 * except where a name filter (`-t`) left it out on purpose.
 */
export default class CountReporter implements Reporter {
  #hasNameFilter = false;

  onInit(vitest: Vitest): void {
    this.#hasNameFilter = vitest.config.testNamePattern !== undefined;
  }

  onTestRunEnd(modules: readonly TestModule[], errors: readonly SerializedError[]): void {
    let passed = 0;
    let failed = errors.length;
    for (const module of modules) {
      const failedBefore = failed;
      for (const test of module.children.allTests()) {
        const { state } = test.result();
        if (state === 'passed') passed += 1;
        else if (state === 'failed' || !this.#hasNameFilter) failed += 1;
      }
      // A file that did not load has no tests of its own to count.
      if (module.state() === 'failed' && failed === failedBefore) failed += 1;
    }
    process.on('exit', (code) => {
      if (code !== 0 && failed === 0) failed = 1;
      if (failed > 0) process.exitCode = 1;
      process.stdout.write(`${passed} passed, ${failed} failed\n`);
    });
  }
}
