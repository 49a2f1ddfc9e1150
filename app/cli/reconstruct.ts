import { readFileSync } from 'node:fs';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { parseReconstructionInput } from '#app/domain/reconstruction-schema.ts';
import { engineVersion } from '#app/physics/model/engine-version.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { exampleInput } from './example-input.ts';

/**
 * `npm run reconstruct -- input.json` prints the result as JSON; `-- --example` prints a complete input. The record of a
 * run, as its page gives it, may be named as well: the result then comes as the exact bytes that were stored, keys in
 * order and no line end, so that `| sha256sum` gives the hash of the record; whether it does is said on the error output.
 */

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

interface RunRecord {
  readonly input: unknown;
  readonly resultHash: string;
  readonly engineVersion: string;
}

function isRecord(value: unknown): value is RunRecord {
  return typeof value === 'object' && value !== null && 'input' in value && 'resultHash' in value && typeof value.resultHash === 'string' && 'engineVersion' in value && typeof value.engineVersion === 'string';
}

/** Exit code of a record whose result this engine does not give again. */
const differs = 2;

function printAgainst(record: RunRecord, result: ReconstructionResult): void {
  const hash = hashOf(result);
  process.stdout.write(canonicalJson(result));
  if (hash === record.resultHash) {
    process.stderr.write(`The same bytes as the record, SHA-256 ${hash}, engine ${engineVersion}.\n`);
    return;
  }
  process.stderr.write(`Not the bytes of the record: SHA-256 ${hash} by engine ${engineVersion}, recorded ${record.resultHash} by engine ${record.engineVersion}.\n`);
  process.exitCode = differs;
}

function main(argument: string | undefined): void {
  if (argument === '--example') {
    process.stdout.write(`${JSON.stringify(exampleInput, null, 2)}\n`);
    return;
  }
  if (argument === undefined) fail('Name a JSON file with the input, or - for standard input, or --example for a complete one.');
  const read = readJson(argument);
  const record = isRecord(read) ? read : null;
  const parsed = parseReconstructionInput(record ? record.input : read);
  if (!parsed.ok) {
    fail(['The input was refused:', ...parsed.problems.map(({ field, message }) => `  ${field}: ${message}`)].join('\n'));
  }
  try {
    const result = reconstruct(parsed.input);
    if (record) printAgainst(record, result);
    else process.stdout.write(`${JSON.stringify(result, null, 2)}\n`);
  } catch (error) {
    if (error instanceof RangeError) fail(error.message);
    throw error;
  }
}

main(process.argv[2]);
