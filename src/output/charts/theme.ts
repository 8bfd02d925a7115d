/** Colours, dashes, fonts and sizes of all charts. */

/** Okabe & Ito's palette for colour-blind readers, darkest first for lines on white; each with a dash of its own so that it reads in grey. */
export const lineStyles: readonly { readonly colour: string; readonly dash: readonly number[] }[] = [
  { colour: '#0072b2', dash: [] },
  { colour: '#d55e00', dash: [9, 4] },
  { colour: '#009e73', dash: [3, 3] },
  { colour: '#8f4f8a', dash: [12, 4, 3, 4] },
  { colour: '#b07a00', dash: [6, 3, 6, 9] },
  { colour: '#3b8fc4', dash: [2, 5] },
  { colour: '#5a5a5a', dash: [14, 6] },
];

export const ink = '#1f2933';
export const faintInk = '#5f6c7b';
export const gridColour = '#e3e8ee';
export const limitColour = '#a3123a';
export const paper = '#ffffff';

export const fontFamily = 'DejaVu Sans';
/** CSS pixels; pictures have twice as many each way. */
export const chartSize = { width: 800, height: 500 } as const;
export const pixelRatio = 2;

export function lineStyle(index: number): (typeof lineStyles)[number] {
  return lineStyles[index % lineStyles.length]!;
}
