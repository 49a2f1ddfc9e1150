import type { ReactNode } from 'react';
import { cautions } from '#app/components/layout/cautions.ts';
import { LogoMark } from '#app/components/layout/logo-mark.tsx';
import type { SheetGroup, SheetRow } from '#app/domain/measurement-sheet.ts';
import { sheetPhotos, weatherRows } from '#app/domain/measurement-sheet.ts';

export interface PaperSheetProps {
  readonly caseNumber: number;
  readonly place: string;
  readonly version: number;
  readonly printed: string;
  readonly sunWords: string;
  readonly declination: string;
  readonly groups: readonly SheetGroup[];
  readonly code: { readonly url: string; readonly size: number; readonly path: string };
  readonly skyline: readonly { readonly azimuthDeg: number; readonly elevationDeg: number; readonly name: string }[];
  readonly isLetter: boolean;
  /** Height of the sketch. [mm] */
  readonly gridMm: number;
}

/** Two pages for the clipboard, in the order of the measurements page. */
export function PaperSheet(props: PaperSheetProps) {
  return (
    // A frame that scrolls must take the keyboard.
    // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex
    <div data-print="alone" className="relative space-y-6 overflow-x-auto print:space-y-0 print:overflow-visible" role="region" aria-label="Sheet for paper" tabIndex={0}>
      <section className={`paper-sheet ${props.isLetter ? 'paper-letter' : ''}`} aria-label="Sheet 1 of 2">
        <SheetHead {...props} page={1} />
        <Before {...props} />
        <table className="w-full border-collapse">
          <caption className="sr-only">Measures to take</caption>
          <thead>
            <tr>{['', 'Measure', 'Value', '±', 'Method', 'Who, when'].map((head) => <th key={head} scope="col" className="!border-[#1c2430] !font-semibold">{head}</th>)}</tr>
          </thead>
          {props.groups.map((group) => <Group key={group.heading} group={group} />)}
        </table>
        <SheetFoot {...props} />
      </section>
      <section className={`paper-sheet ${props.isLetter ? 'paper-letter' : ''}`} aria-label="Sheet 2 of 2">
        <SheetHead {...props} page={2} />
        <Sketch gridMm={props.gridMm} />
        <div className="mt-[3mm] grid grid-cols-[118mm_1fr] gap-[5mm]">
          <SkylineTable points={props.skyline} />
          <Weather />
        </div>
        <p className="mt-[2.5mm]"><b className="font-semibold">Photos</b> {sheetPhotos.map((one) => <Tick key={one}>{one}</Tick>)}</p>
        <p className="mt-[1.5mm]">“Don’t know” is an answer: write DK. {cautions.evidence}</p>
        <SheetFoot {...props} />
      </section>
    </div>
  );
}

function SheetHead({ caseNumber, place, page }: PaperSheetProps & { readonly page: 1 | 2 }) {
  return (
    <div className="flex items-center justify-between gap-[4mm] border-b-[0.6mm] border-[#1c2430] pb-[1.5mm]">
      <span className="flex flex-none items-center gap-[2mm] font-semibold"><LogoMark /> Scorchline measurement sheet</span>
      <span className="min-w-0 truncate">Case {caseNumber}, {place}</span>
      <span className="flex-none">Sheet {page} of 2</span>
    </div>
  );
}

function Before({ code, sunWords, declination }: PaperSheetProps) {
  return (
    <div className="flex gap-[4mm] py-[2mm]">
      <div className="flex-1 border-l-[1.2mm] border-[#1c2430] pl-[2.5mm]">
        <p><b className="font-semibold">Before you go up.</b> {cautions.roof}</p>
        <p>{cautions.eyes.split('. ').slice(0, 3).join('. ')}.</p>
        <p><b className="font-semibold">Sun here:</b> {sunWords} {declination}</p>
      </div>
      <div className="w-[36mm] flex-none space-y-[2mm]">
        {['Measured by', 'Date and start', 'Phone clock, true time'].map((label) => <p key={label} className="border-b-[0.3mm] border-[#1c2430] pb-[4mm]">{label}</p>)}
      </div>
      <div className="flex-none text-center">
        <svg viewBox={`0 0 ${code.size} ${code.size}`} className="h-[24mm] w-[24mm]" role="img" aria-label={`Code that leads to ${code.url}`} shapeRendering="crispEdges"><path d={code.path} fill="#000000" /></svg>
        <p>opens this form</p>
      </div>
    </div>
  );
}

function Group({ group }: { readonly group: SheetGroup }) {
  return (
    <tbody>
      <tr><th colSpan={6} scope="colgroup" className="!border-[#1c2430] !pt-[1mm] font-serif text-[10pt]">{group.heading}</th></tr>
      {group.rows.map((row) => <Line key={row.number} row={row} />)}
    </tbody>
  );
}

function Line({ row }: { readonly row: SheetRow }) {
  const wide = row.unit === '' && !row.bearing;
  return (
    <tr>
      <td className="w-[6mm] font-serif">{row.number}</td>
      <th scope="row" className="paper-close w-[53mm]"><span className="font-semibold">{row.label}</span>{row.help ? <span className="block">{row.help}</span> : null}</th>
      <td className="w-[60mm]">
        <Box width={wide && row.choices.length < 2 ? 30 : 19}>{row.value}</Box> {row.unit}
        {row.bearing ? <>{['true', 'mag.', 'grid'].map((north) => <Tick key={north} on={north === 'true' && row.value !== ''}>{north}</Tick>)}</> : null}
        {row.choices.map((choice) => <Tick key={choice}>{choice}</Tick>)}
      </td>
      <td className="w-[12mm]"><Box width={10}>{row.plusMinus}</Box></td>
      <td className="paper-close w-[26mm]">{row.method ? <span className="block">{row.method}</span> : <Box width={24} />}</td>
      <td className="paper-close w-[23mm]">{row.by ? <span className="block">{row.by}<br />{row.on}</span> : <Box width={22} />}</td>
    </tr>
  );
}

function Box({ width, children }: { readonly width: number; readonly children?: ReactNode }) {
  return <span className="paper-box" style={{ width: `${width}mm` }}>{children}</span>;
}

function Tick({ on = false, children }: { readonly on?: boolean; readonly children: ReactNode }) {
  return <span className="ml-[1.2mm] whitespace-nowrap"><span className="paper-tick" style={on ? { background: '#1c2430' } : undefined} /> {children}</span>;
}

function Sketch({ gridMm }: { readonly gridMm: number }) {
  return (
    <div className="pt-[2mm]">
      <p className="pb-[1.5mm]"><b className="font-semibold">Sketch, plan above, section below</b> one square = <Box width={18} /> Draw optic, opening, walls, mark and the datum of heights.</p>
      <svg viewBox={`0 0 180 ${gridMm}`} className="block w-full" role="img" aria-label="Empty grid of 5 mm with an arrow to true north">
        <defs>
          <pattern id="sheet-fine" width="5" height="5" patternUnits="userSpaceOnUse"><path d="M5 0H0V5" fill="none" stroke="#cfc7b4" strokeWidth="0.15" /></pattern>
          <pattern id="sheet-bold" width="25" height="25" patternUnits="userSpaceOnUse"><path d="M25 0H0V25" fill="none" stroke="#8d8675" strokeWidth="0.2" /></pattern>
        </defs>
        <rect width="180" height={gridMm} fill="url(#sheet-fine)" />
        <rect width="180" height={gridMm} fill="url(#sheet-bold)" stroke="#1c2430" strokeWidth="0.5" />
        <path d="M170 22V6M167 10l3-5 3 5" fill="none" stroke="#1c2430" strokeWidth="0.5" />
        <text x="170" y="27" textAnchor="middle" fontSize="4" fill="#1c2430">N, true</text>
      </svg>
    </div>
  );
}

const skylineRows = 14;

function SkylineTable({ points }: { readonly points: PaperSheetProps['skyline'] }) {
  const filled = points.slice(0, skylineRows);
  const rows = Array.from({ length: skylineRows }, (_, index) => filled[index]);
  return (
    <table className="w-full border-collapse">
      <caption className="pb-[1mm] text-left font-semibold">Skyline from the optic{points.length > skylineRows ? `, first ${skylineRows} of ${points.length} points` : ''}</caption>
      <thead><tr>{['Bearing, ° true', 'Elevation, °', '±', 'Tree: bare, leaf', 'What it is'].map((head) => <th key={head} scope="col" className="!border-[#1c2430] !font-semibold">{head}</th>)}</tr></thead>
      <tbody>
        {rows.map((point, index) => (
          <tr key={index} className="h-[5.6mm]"><td>{point?.azimuthDeg}</td><td>{point?.elevationDeg}</td><td /><td /><td>{point?.name}</td></tr>
        ))}
      </tbody>
    </table>
  );
}

function Weather() {
  return (
    <table className="h-min w-full border-collapse">
      <caption className="pb-[1mm] text-left font-semibold">Weather and clocks</caption>
      <tbody>
        {[...weatherRows, 'Panel clock reads', 'True time then', 'Camera clock reads', 'True time then, camera'].map((label) => <tr key={label} className="h-[8mm]"><th scope="row" className="w-[30mm]">{label}</th><td /></tr>)}
      </tbody>
    </table>
  );
}

function SheetFoot({ caseNumber, version, printed }: PaperSheetProps) {
  return (
    <p className="mt-auto flex justify-between border-t-[0.4mm] border-[#1c2430] pt-[1mm]">
      <span>Same order as on the screen. Photograph the paper as evidence.</span>
      <span className="font-mono">{caseNumber}, version {version}, {printed}</span>
    </p>
  );
}
