/** Options of structure elements that the library has and its types do not name yet. */
declare namespace PDFKit.Mixins {
  interface StructureElementOptions {
    /** Which cells a table head stands for. */
    scope?: 'Row' | 'Column' | 'Both';
    /** Left, top, right and bottom edge on the page. [pt] */
    bbox?: [number, number, number, number];
  }
}
