/** Width of a text in Noto Sans, estimated on the generous side: enough to tell whether two labels would touch. */
export const textWidth = (text: string, size: number): number => text.length * size * 0.56;
