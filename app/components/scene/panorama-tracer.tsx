import { useRef, useState } from 'react';
import type { MouseEvent } from 'react';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { directionOn, fitPanorama, photoProjections } from '#app/domain/panorama.ts';
import type { PhotoProjection } from '#app/domain/panorama.ts';
import { readNumber } from '#app/domain/scene-lines.ts';
import type { SkylineRow } from '#app/domain/skyline-form.ts';
import { DragHandle, pointIn } from './drag-handle.tsx';

export interface PanoramaPhoto {
  readonly id: string;
  readonly label: string;
  readonly alt: string;
}
interface Known {
  readonly x: number;
  readonly y: number;
  readonly azimuth: string;
  readonly elevation: string;
}
interface Place {
  readonly x: number;
  readonly y: number;
}

const projectionLabels: Record<PhotoProjection, string> = { swept: 'Panorama, swept', single: 'One ordinary photo' };

/** Skyline traced on a photo: two bearings or more are known in it, then each click is a point. */
export function PanoramaTracer({ photos, onRows }: { readonly photos: readonly PanoramaPhoto[]; readonly onRows: (rows: readonly SkylineRow[]) => void }) {
  const [photoId, setPhotoId] = useState(photos[0]?.id ?? '');
  const [projection, setProjection] = useState<PhotoProjection>('swept');
  const [size, setSize] = useState<{ width: number; height: number } | null>(null);
  const [setting, setSetting] = useState<'known' | 'skyline'>('known');
  const [known, setKnown] = useState<readonly Known[]>([]);
  const [traced, setTraced] = useState<readonly Place[]>([]);
  const [plusMinus, setPlusMinus] = useState('0.5');
  const svg = useRef<SVGSVGElement>(null);
  const photo = photos.find((one) => one.id === photoId);
  const readKnown = known.flatMap((point) => {
    const [azimuthDeg, elevation] = [readNumber(point.azimuth), readNumber(point.elevation)];
    return azimuthDeg >= 0 && azimuthDeg <= 360 ? [{ x: point.x, y: point.y, azimuthDeg, elevationDeg: Number.isNaN(elevation) ? null : elevation }] : [];
  });
  const fit = size ? fitPanorama(projection, size, readKnown) : null;
  const click = (event: MouseEvent<SVGSVGElement>) => {
    if (event.target instanceof Element && event.target.closest('[role=slider]')) return;
    const point = pointIn(svg.current, event);
    if (!point) return;
    if (setting === 'known') setKnown([...known, { ...point, azimuth: '', elevation: '' }]);
    else setTraced([...traced, point].toSorted((a, b) => a.x - b.x));
  };
  const use = () => {
    if (!fit) return;
    onRows(traced.map((point) => {
      const { azimuthDeg, elevationDeg } = directionOn(fit, point);
      return { azimuthDeg: azimuthDeg.toFixed(1), elevationDeg: elevationDeg.toFixed(1), plusMinusDeg: plusMinus, source: 'panorama', leaf: '', name: '' };
    }));
    setTraced([]);
  };
  const move = <Item extends Place>(list: readonly Item[], at: number, x: number, y: number): Item[] => list.map((item, index) => (index === at ? { ...item, x, y } : item));
  return (
    <section className="space-y-4">
      <SectionHeading note="taken level, from the place of the optic">Trace on a photo</SectionHeading>
      <div className="grid gap-4 tablet:grid-cols-3">
        <Select field={{ name: '', id: 'panorama-photo' }} label="Photo" value={photoId} onChange={(event) => { setPhotoId(event.currentTarget.value); setSize(null); setKnown([]); setTraced([]); }} options={photos.map((one) => ({ value: one.id, label: one.label }))} />
        <Select field={{ name: '', id: 'panorama-kind' }} label="Kind of picture" value={projection} onChange={(event) => setProjection(photoProjections.find((one) => one === event.currentTarget.value) ?? 'swept')} options={photoProjections.map((value) => ({ value, label: projectionLabels[value] }))} />
        <TextInput field={{ name: '', id: 'panorama-plus-minus' }} label="± of the traced points, °" inputMode="decimal" value={plusMinus} onChange={(event) => setPlusMinus(event.currentTarget.value)} />
      </div>
      <div className="flex flex-wrap gap-2">
        <button type="button" className="chip" aria-pressed={setting === 'known'} onClick={() => setSetting('known')}>A click sets a known bearing</button>
        <button type="button" className="chip" aria-pressed={setting === 'skyline'} onClick={() => setSetting('skyline')}>A click sets a point of the skyline</button>
      </div>
      {photo ? (
        // A frame that scrolls must take the keyboard.
        // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex
        <div className="relative overflow-x-auto border border-edge" role="region" aria-label={`Photo ${photo.label}`} tabIndex={0}>
          <div className="relative min-w-[640px]">
            <img key={photo.id} src={`/photos/${photo.id}/view`} alt={photo.alt} className="block w-full" onLoad={(event) => setSize({ width: event.currentTarget.naturalWidth, height: event.currentTarget.naturalHeight })} ref={(image) => { if (image?.complete && image.naturalWidth > 0 && !size) setSize({ width: image.naturalWidth, height: image.naturalHeight }); }} />
            {size ? (
              <svg ref={svg} viewBox={`0 0 ${size.width} ${size.height}`} className="absolute inset-0 h-full w-full cursor-crosshair" role="group" aria-label="Points on the photo" onClick={click}>
                {fit ? <line x1="0" x2={size.width} y1={fit.levelY} y2={fit.levelY} stroke="#fcf9f3" strokeWidth="2" strokeDasharray="8 6" vectorEffect="non-scaling-stroke" /> : null}
                {traced.length > 1 ? <><polyline points={traced.map((point) => `${point.x},${point.y}`).join(' ')} fill="none" stroke="#dee6dd" strokeWidth="6" vectorEffect="non-scaling-stroke" /><polyline points={traced.map((point) => `${point.x},${point.y}`).join(' ')} fill="none" stroke="#1c2430" strokeWidth="1.9" vectorEffect="non-scaling-stroke" /></> : null}
                {traced.map((point, index) => <DragHandle key={`t${index}`} x={point.x} y={point.y} size={size.width / 110} label={`Skyline point ${index + 1}`} valueNow={point.x} valueText={fit ? directionWords(directionOn(fit, point)) : `${Math.round(point.x)} right, ${Math.round(point.y)} down`} chosen={false} onChoose={() => undefined} onMove={(x, y) => setTraced(move(traced, index, x, y))} onStep={(right, down) => setTraced(move(traced, index, point.x + right, point.y + down))} />)}
                {known.map((point, index) => <DragHandle key={`k${index}`} x={point.x} y={point.y} size={size.width / 70} label={`Known bearing ${index + 1}`} mark={`${index + 1}`} valueNow={point.x} valueText={`${point.azimuth || 'no'} degrees`} chosen onChoose={() => undefined} onMove={(x, y) => setKnown(move(known, index, x, y))} onStep={(right, down) => setKnown(move(known, index, point.x + right, point.y + down))} />)}
              </svg>
            ) : null}
          </div>
        </div>
      ) : null}
      {known.map((point, index) => (
        <div key={index} className="grid grid-cols-2 items-end gap-3 tablet:grid-cols-[8rem_10rem_12rem_auto]">
          <p className="self-center font-semibold max-tablet:col-span-2">Known bearing {index + 1}</p>
          <TextInput field={{ name: '', id: `known-${index}-azimuth` }} label="Bearing, ° true" inputMode="decimal" value={point.azimuth} onChange={(event) => setKnown(known.map((one, at) => (at === index ? { ...one, azimuth: event.currentTarget.value } : one)))} />
          <TextInput field={{ name: '', id: `known-${index}-elevation` }} label="Elevation, °, if known" inputMode="decimal" value={point.elevation} onChange={(event) => setKnown(known.map((one, at) => (at === index ? { ...one, elevation: event.currentTarget.value } : one)))} />
          <Button type="button" look="quiet" className="min-h-11 text-left" onClick={() => setKnown(known.filter((_one, at) => at !== index))}>Take away</Button>
        </div>
      ))}
      <p role="status">{statusWords(fit, readKnown.length, traced.length)}</p>
      {fit && traced.length > 0 ? <div className="flex flex-wrap gap-3"><Button type="button" look="outlined" onClick={use}>Put {traced.length} {traced.length === 1 ? 'point' : 'points'} into the table</Button><Button type="button" look="quiet" onClick={() => setTraced(traced.slice(0, -1))}>Take away the last on the right</Button></div> : null}
    </section>
  );
}

const directionWords = ({ azimuthDeg, elevationDeg }: { azimuthDeg: number; elevationDeg: number }) => `${azimuthDeg.toFixed(1)}° true, ${elevationDeg.toFixed(1)}° up`;

function statusWords(fit: ReturnType<typeof fitPanorama>, knownCount: number, tracedCount: number): string {
  if (knownCount < 2) return `Click two things or more whose true bearing is known, and type it: ${knownCount} of 2.`;
  if (!fit) return 'These bearings do not go with their places: from left to right they must grow clockwise.';
  const left = knownCount > 2 ? ` Fit left over ${fit.leftOverDeg.toFixed(2)}°.` : ' Two bearings leave nothing to check the fit by; a third would.';
  const level = fit.levelAssumed ? ' No elevation is known: the level line is taken at half the height, which holds only for a camera held level.' : '';
  return `${fit.pxPerRad / 57.2958 >= 1 ? (fit.pxPerRad / 57.2958).toFixed(1) : (fit.pxPerRad / 57.2958).toFixed(2)} pixels a degree.${left}${level}${tracedCount === 0 ? ' Now set points of the skyline.' : ''}`;
}
