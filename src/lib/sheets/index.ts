/** Plan sheets as drawings in paper millimetres, and their renderers. Reads font files: for the server only. */
export type * from './drawing';
export type { PlanContent, PlanHeading } from './plan-content';
export { planSheets } from './plan-sheets';
export { sheetToSvg } from './to-svg';
export { sheetsToPdf, type PdfFacts } from './to-pdf';
export { checkSums } from './check-sums';
export { grownTreesInWords, treesInWords } from './tree-years';
