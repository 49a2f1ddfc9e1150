/** What a form holds, by field name; files and fields that name the report itself are left out. */
export function formValues(form: HTMLFormElement): Record<string, string> {
  const values: Record<string, string> = {};
  for (const [name, value] of new FormData(form)) if (typeof value === 'string' && name !== 'clientId' && name !== 'intent') values[name] = value;
  return values;
}

/** Puts kept words back into the fields of the page. */
export function fillForm(form: HTMLFormElement, values: Readonly<Record<string, string>>): void {
  for (const element of form.elements) {
    if (element instanceof HTMLInputElement && (element.type === 'radio' || element.type === 'checkbox')) {
      if (element.name in values) element.checked = values[element.name] === element.value;
    } else if (element instanceof HTMLInputElement || element instanceof HTMLTextAreaElement || element instanceof HTMLSelectElement) {
      const fixed = element instanceof HTMLInputElement && (element.type === 'file' || (element.type === 'hidden' && element.name !== 'foundNowAt' && element.name !== 'accuracyM'));
      const kept = values[element.name];
      if (!fixed && kept !== undefined) element.value = kept;
    }
  }
}

/** Answers one question as if the person had: the page and the kept words follow. */
export function answerField(form: HTMLFormElement, name: string, value: string): void {
  const choice = form.querySelector(`input[type="radio"][name="${CSS.escape(name)}"][value="${CSS.escape(value)}"]`);
  if (choice instanceof HTMLInputElement) {
    choice.click();
    return;
  }
  const field = form.elements.namedItem(name);
  if (!(field instanceof HTMLInputElement || field instanceof HTMLTextAreaElement || field instanceof HTMLSelectElement)) return;
  // Through the element's own setter, which fields that React controls listen to.
  const prototype: object | null = Object.getPrototypeOf(field);
  Object.getOwnPropertyDescriptor(prototype ?? {}, 'value')?.set?.call(field, value);
  field.dispatchEvent(new Event('input', { bubbles: true }));
  field.dispatchEvent(new Event('change', { bubbles: true }));
}
