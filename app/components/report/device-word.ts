/** A desk computer is not called a phone. Call it only where a script runs. */
export const deviceWord = (): 'phone' | 'device' => (window.matchMedia('(pointer: coarse)').matches ? 'phone' : 'device');
