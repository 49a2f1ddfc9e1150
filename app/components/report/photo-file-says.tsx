import { Button } from '#app/components/ui/button.tsx';
import { toLocalInput } from '#app/domain/local-time.ts';
import type { PhotoDetails } from '#app/domain/photo-details.ts';
import { offersOf } from '#app/domain/photo-view.ts';
import type { PhotoOffer } from '#app/domain/photo-view.ts';
import { exifInstant } from '#app/domain/photo.ts';
import type { KeptPhoto } from './device-store.ts';
import { photoDifference } from './photo-difference.ts';
import type { StatedFinding } from './stated-finding.ts';

export interface PhotoFileSaysProps {
  readonly photo: KeptPhoto;
  readonly finding: StatedFinding;
  readonly onUse: (values: Readonly<Record<string, string>>) => void;
  readonly onSay: (details: Partial<PhotoDetails>) => void;
}

/** What the file says of time and place: put to the person field by field, used only when taken. */
export function PhotoFileSays({ photo, finding, onUse, onSay }: PhotoFileSaysProps) {
  // Before a site is chosen the clock of the place is unknown; UTC only serves to repeat what the file says.
  const zone = finding.zone ?? 'UTC';
  const { timeAnswer, placeAnswer, clockErrorS } = photo.details;
  const offers = offersOf({ exif: photo.exif, exifAnswer: { time: timeAnswer, place: placeAnswer, answeredAt: null } }, zone);
  const takenAt = exifInstant(photo.exif, zone);
  const difference = photoDifference(photo, finding);
  if (offers.length === 0) return <p className="text-small text-second">This file says nothing of when and where it was taken.</p>;
  const found = takenAt ? toLocalInput(new Date(takenAt.getTime() - clockErrorS * 1000), zone) : null;
  return (
    <div className="space-y-3">
      {offers.map((offer) => (
        <div key={offer.kind} className="border-l-4 border-hair pl-3">
          <p className="text-small">{offer.says}</p>
          {offer.answer ? <p className="text-small font-semibold">{offer.answer === 'accepted' ? 'Right, you said.' : 'Not right, you said.'}</p> : null}
          <OfferButtons offer={offer} onSay={onSay} />
          {offer.kind === 'time' && found && finding.zone ? (
            <p><Button type="button" look="quiet" className="min-h-11 text-left" onClick={() => { onSay({ timeAnswer: 'accepted' }); onUse({ foundWhen: 'at', foundLocal: found }); }}>Use {found.slice(11)}{clockErrorS === 0 ? '' : ', corrected,'} as the time found</Button></p>
          ) : null}
          {offer.kind === 'place' && photo.exif.latitudeDeg !== null && photo.exif.longitudeDeg !== null ? <UsePlace photo={photo} onUse={onUse} onSay={onSay} /> : null}
        </div>
      ))}
      {difference ? <p className="flex gap-2 text-small font-semibold" role="status"><span aria-hidden="true">!</span><span>{difference} Both may be right: a photo can be taken later.</span></p> : null}
    </div>
  );
}

function OfferButtons({ offer, onSay }: { readonly offer: PhotoOffer; readonly onSay: PhotoFileSaysProps['onSay'] }) {
  const say = (answer: 'accepted' | 'declined') => onSay(offer.kind === 'time' ? { timeAnswer: answer } : { placeAnswer: answer });
  const what = offer.kind === 'time' ? 'the time' : 'the place';
  return (
    <div className="flex flex-wrap gap-x-5">
      {offer.answer === 'accepted' ? null : <Button type="button" look="quiet" className="min-h-11" onClick={() => say('accepted')}>That is right<span className="sr-only">: {what}</span></Button>}
      {offer.answer === 'declined' ? null : <Button type="button" look="quiet" className="min-h-11" onClick={() => say('declined')}>That is wrong<span className="sr-only">: {what}</span></Button>}
    </div>
  );
}

function UsePlace({ photo, onUse, onSay }: { readonly photo: KeptPhoto; readonly onUse: PhotoFileSaysProps['onUse']; readonly onSay: PhotoFileSaysProps['onSay'] }) {
  const { latitudeDeg, longitudeDeg, accuracyM } = photo.exif;
  const use = () => {
    onSay({ placeAnswer: 'accepted' });
    onUse({ latitudeDeg: String(latitudeDeg), longitudeDeg: String(longitudeDeg), ...(accuracyM ? { accuracyM: String(Math.round(accuracyM)) } : {}) });
  };
  return <p><Button type="button" look="quiet" className="min-h-11 text-left" onClick={use}>Use it as the position of the mark</Button></p>;
}
