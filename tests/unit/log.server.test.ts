import { expect, test } from 'vitest';
import { describeError } from '#app/log.server.ts';

test('a failed statement is logged without the values it was run with', () => {
  const cause = Object.assign(new Error('duplicate key value violates unique constraint'), {
    code: '23505',
    detail: 'Key (email)=(ada@rooftop.example) already exists.',
    parameters: ['ada@rooftop.example'],
  });
  const error = new Error('Failed query: insert into people (email) values ($1)\nparams: ada@rooftop.example', { cause });
  const logged = JSON.stringify(describeError(error));
  expect(logged).not.toContain('ada@rooftop.example');
  expect(logged).toContain('insert into people');
  expect(logged).toContain('23505');
});

test('what is thrown without being an error is logged without its contents', () => {
  expect(JSON.stringify(describeError('token abc123'))).not.toContain('abc123');
});
