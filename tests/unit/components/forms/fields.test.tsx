import { useForm } from '@conform-to/react';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { ChoiceChips, dontKnowOption } from '#app/components/forms/choice-chips.tsx';
import { DateTimeRange } from '#app/components/forms/date-time-range.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { MeasuredField, northFrames } from '#app/components/forms/measured-field.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';

const northMissing = 'Say which north: true, magnetic or grid.';

describe('TextInput', () => {
  it('ties label, error and help to the control and keeps what was typed', () => {
    const html = renderToStaticMarkup(<TextInput field={{ name: 'bearing', initialValue: '331.7', defaultValue: '336.6', errors: [northMissing] }} label="Bearing to mark" help="degrees" />);
    expect(html).toContain('<label for="bearing"');
    expect(html).toMatch(/<input[^>]*id="bearing"[^>]*>/);
    expect(html).toMatch(/aria-invalid="true"/);
    expect(html).toContain('aria-describedby="bearing-error bearing-help"');
    expect(html).toContain('value="331.7"');
    expect(html).toMatch(/id="bearing-error"[^>]*>.*Say which north/);
  });

  it('says nothing of errors where there are none', () => {
    const html = renderToStaticMarkup(<TextInput field={{ name: 'bearing' }} label="Bearing" />);
    expect(html).not.toContain('aria-invalid');
    expect(html).not.toContain('aria-describedby');
  });

  it('makes a usable id of a nested name', () => {
    expect(renderToStaticMarkup(<TextInput field={{ name: 'marks[0].length' }} label="Length" />)).toContain('for="marks-0-length"');
  });

  it('takes the metadata of a form library field as it is, after a failed save too', () => {
    function SiteForm() {
      const [, fields] = useForm<{ email: string }>({ id: 'sign-in', lastResult: { status: 'error', initialValue: { email: 'ines@' }, error: { email: ['Write the whole address.'] } } });
      return <TextInput field={fields.email} label="Work e-mail" type="email" />;
    }
    const html = renderToStaticMarkup(<SiteForm />);
    expect(html).toContain('value="ines@"');
    expect(html).toContain('name="email"');
    expect(html).toContain('Write the whole address.');
    expect(html).toMatch(/<label for="([^"]+)".*<input[^>]*id="\1"/s);
  });
});

describe('ChoiceChips', () => {
  it('is a radio group that needs no script, with the chosen answer kept', () => {
    const html = renderToStaticMarkup(<ChoiceChips field={{ name: 'hurt', initialValue: 'dont-know' }} legend="Was anyone hurt?" options={[{ value: 'no', label: 'No' }, dontKnowOption]} />);
    expect(html).toContain('<fieldset');
    expect(html.match(/type="radio"/g)).toHaveLength(2);
    expect(html).toMatch(/value="dont-know"[^>]*checked=""|checked=""[^>]*value="dont-know"/);
    expect(html).toContain('data-dashed');
  });

  it('sends several answers as checkboxes', () => {
    const html = renderToStaticMarkup(<ChoiceChips field={{ name: 'seen', initialValue: ['smoke', 'melt'] }} legend="Seen" multiple options={[{ value: 'smoke', label: 'Smoke' }, { value: 'melt', label: 'Melt' }, { value: 'mark', label: 'Mark' }]} />);
    expect(html.match(/checked=""/g)).toHaveLength(2);
  });
});

describe('MeasuredField', () => {
  it('asks for value, unit, uncertainty and method, and for the north of a bearing with nothing chosen beforehand', () => {
    const html = renderToStaticMarkup(
      <MeasuredField legend="Bearing to mark" value={{ name: 'b.value' }} uncertainty={{ name: 'b.sigma' }} unit={{ name: 'b.unit' }} units={[{ value: 'deg', label: '°' }]} method={{ name: 'b.method' }} methods={[{ value: 'shadow', label: 'Timed shadow' }]} frame={{ name: 'b.frame', errors: [northMissing] }} />,
    );
    for (const name of ['b.value', 'b.sigma', 'b.unit', 'b.method', 'b.frame']) expect(html).toContain(`name="${name}"`);
    expect(html.match(/name="b.frame"/g)).toHaveLength(northFrames.length);
    expect(html).not.toContain('checked=""');
    expect(html).toContain(northMissing);
  });
});

describe('DateTimeRange', () => {
  it('names the zone of the place and takes local wall time', () => {
    const html = renderToStaticMarkup(<DateTimeRange legend="When" from={{ name: 'from', initialValue: '2026-02-03T08:40' }} to={{ name: 'to' }} zone="America/New_York" zoneNote="UTC-5" />);
    expect(html).toContain('value="2026-02-03T08:40"');
    expect(html).toContain('America/New York, UTC-5');
    expect(html.match(/type="datetime-local"/g)).toHaveLength(2);
  });
});

describe('ErrorSummary', () => {
  it('leads to each field in error and is silent without errors', () => {
    const field = { name: 'marks[0].length', errors: ['Give the length in mm.'] };
    const html = renderToStaticMarkup(<ErrorSummary fields={[{ field, label: 'Length' }, { field: { name: 'ok' }, label: 'Fine' }]} />);
    expect(html).toContain('href="#marks-0-length"');
    expect(html).not.toContain('Fine');
    expect(renderToStaticMarkup(<ErrorSummary fields={[{ field: { name: 'ok' }, label: 'Fine' }]} />)).toBe('');
  });
});
