/** What a line is drawn in. */
export type ChartTone = 'ink' | 'accent' | 'rust' | 'frost' | 'muted';

/** Colours and type of the charts, read from the page so that both themes hold. */
export interface ChartTheme {
  tones: Record<ChartTone, string>;
  grid: string;
  axis: string;
  paper: string;
  font: { family: string; size: number };
}

/** Reads the theme in force from the custom properties of `styles.css`. */
export function readChartTheme(element: Element): ChartTheme {
  const style = getComputedStyle(element);
  const colour = (name: string): string => style.getPropertyValue(`--${name}`).trim() || 'currentColor';
  return {
    tones: {
      ink: colour('ink'),
      accent: colour('accent'),
      rust: colour('rust'),
      frost: colour('frost'),
      muted: colour('muted'),
    },
    grid: colour('hair'),
    axis: colour('line'),
    paper: colour('paper'),
    font: { family: style.fontFamily || 'sans-serif', size: 11.5 },
  };
}
