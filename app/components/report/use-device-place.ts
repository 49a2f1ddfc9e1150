import { useState } from 'react';
import type { Place } from '#app/domain/coordinate-text.ts';

export interface DevicePlace {
  /** What the device is doing, or why it gave nothing. */
  readonly words: string;
  readonly ask: () => void;
}

/** Asks the device where it is, once, on a press. */
export function useDevicePlace(onPlace: (place: Place, accuracyM: number) => void): DevicePlace {
  const [words, setWords] = useState('');
  const ask = () => {
    if (!('geolocation' in navigator)) {
      setWords('This device cannot say where it is. Choose the site, or type the position.');
      return;
    }
    setWords('Asking this device');
    navigator.geolocation.getCurrentPosition(
      ({ coords }) => {
        setWords('');
        onPlace({ latitudeDeg: coords.latitude, longitudeDeg: coords.longitude }, coords.accuracy);
      },
      (error) => setWords(error.code === error.PERMISSION_DENIED
        ? 'This device was told not to say where it is. Choose the site, or type the position.'
        : 'This device does not know where it is. Choose the site, or type the position.'),
      { enableHighAccuracy: true, timeout: 20_000, maximumAge: 60_000 },
    );
  };
  return { words, ask };
}
