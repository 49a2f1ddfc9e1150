import { readFileSync } from 'node:fs';
import { parseReconstructionInput } from '#app/domain/reconstruction-schema.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { exampleInput } from './example-input.ts';

/** `npm run reconstruct -- input.json` prints the result as JSON; `-- --example` prints a complete input. */

function fail(message: string): never {
  process.stderr.write(`${message}\n`);
  process.exit(1);
}

function readJson(path: string): unknown {
  let text: string;
  try {
    text = readFileSync(path === '-' ? 0 : path, 'utf8');
  } catch {
    fail(`The file ${path} cannot be read; check its name.`);
  }
  try {
    return JSON.parse(text);
  } catch (error) {
    fail(`The file ${path} is not JSON: ${error instanceof Error ? error.message : 'unknown error'}.`);
  }
}

function main(argument: string | undefined): void {
  if (argument === '--example') {
    process.stdout.write(`${JSON.stringify(exampleInput, null, 2)}\n`);
    return;
  }
  if (argument === undefined) fail('Name a JSON file with the input, or - for standard input, or --example for a complete one.');
  const parsed = parseReconstructionInput(readJson(argument));
  if (!parsed.ok) {
    fail(['The input was refused:', ...parsed.problems.map(({ field, message }) => `  ${field}: ${message}`)].join('\n'));
  }
  try {
    process.stdout.write(`${JSON.stringify(reconstruct(parsed.input), null, 2)}\n`);
  } catch (error) {
    if (error instanceof RangeError) fail(error.message);
    throw error;
  }
}

main(process.argv[2]);
