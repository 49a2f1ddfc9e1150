/** Everything that needs Leaflet, in one part of the program that is loaded only when a map is shown. */
export { default as CaseMap } from './case-map.client.tsx';
export { default as PickerMap } from './picker-map.client.tsx';
