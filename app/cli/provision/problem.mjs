/** A foreseeable obstacle. Its message is one sentence that says what to do; no stack trace is shown for it. */
export class SetupProblem extends Error {
  /** @param {string} sentence What is wrong and how to mend it. @param {string} [detail] Output of the tool that failed. */
  constructor(sentence, detail = '') {
    super(sentence);
    this.name = 'SetupProblem';
    this.detail = detail;
  }
}

/** Prints a failure the way a newcomer can act on it, and returns the exit code. */
export function reportProblem(error) {
  if (error instanceof SetupProblem) {
    if (error.detail) console.error(lastLines(error.detail, 40));
    console.error(`\n${error.message}`);
  } else {
    console.error(error);
  }
  return 1;
}

/** The end of a tool's output, where the reason for its failure usually is. */
export function lastLines(text, count) {
  return text.trimEnd().split('\n').slice(-count).join('\n');
}
