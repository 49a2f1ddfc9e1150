import { expect, test } from 'vitest';
import { tileOrigin } from '#app/http/security-headers.server.ts';

// What a host source may look like: Content Security Policy Level 3, W3C, section 2.3.1.
test.each([
  ['https://tiles.example.org/{z}/{x}/{y}.png', 'https://tiles.example.org'],
  ['https://{s}.tiles.example.org/{z}/{x}/{y}.png?key=1', 'https://*.tiles.example.org'],
  ['http://127.0.0.1:8080/{z}/{x}/{y}', 'http://127.0.0.1:8080'],
])('pictures from %s are let in by %s and nothing wider', (url, origin) => {
  expect(tileOrigin(url)).toBe(origin);
});
