/** The number in the address of a case; 0, which no case has, when it is not one. */
export function readCaseNumber(text: string): number {
  const number = /^\d{1,9}$/u.test(text) ? Number(text) : 0;
  return number <= 2_147_483_647 ? number : 0;
}
