import { createContext, useContext } from 'react';

/** An optional tile server under the maps; without one the outlines that ship with the application are all there is. */
export interface MapTiles {
  /** Address with {z}, {x} and {y}. */
  readonly url: string;
  /** Whose map it is, as its owner wants it said. */
  readonly attribution: string;
}

export const MapTilesContext = createContext<MapTiles | null>(null);
export const useMapTiles = (): MapTiles | null => useContext(MapTilesContext);
