import type { Ground } from './palette';

/** The colours and letters of a chart that are not a level's. */
export interface ChartTheme {
  readonly ground: Ground;
  readonly paper: string;
  readonly plot: string;
  readonly text: string;
  readonly quietText: string;
  readonly grid: string;
  readonly axis: string;
  readonly cursor: string;
  readonly caution: string;
  readonly fontFamily: string;
  readonly fontSize: number;
}

const WINDOW_FONT = "'Source Sans 3 Variable', sans-serif";

export const LIGHT_CHART: ChartTheme = {
  ground: 'light',
  paper: 'rgba(0,0,0,0)',
  plot: 'rgba(0,0,0,0)',
  text: '#1d2529',
  quietText: '#5a666c',
  grid: '#e4e8e6',
  axis: '#9aa5a8',
  cursor: '#7a4bb0',
  caution: '#a85b00',
  fontFamily: WINDOW_FONT,
  fontSize: 13,
};

export const DARK_CHART: ChartTheme = {
  ground: 'dark',
  paper: 'rgba(0,0,0,0)',
  plot: 'rgba(0,0,0,0)',
  text: '#e3e8e9',
  quietText: '#9aa7ac',
  grid: '#2a3337',
  axis: '#5b686d',
  cursor: '#c3a2f0',
  caution: '#f0b25e',
  fontFamily: WINDOW_FONT,
  fontSize: 13,
};

/** For paper: white ground, and letters that every machine has. */
export const PRINT_CHART: ChartTheme = {
  ...LIGHT_CHART,
  paper: '#ffffff',
  plot: '#ffffff',
  text: '#000000',
  quietText: '#333333',
  grid: '#dddddd',
  axis: '#555555',
  fontFamily: 'Helvetica, Arial, sans-serif',
  fontSize: 14,
};
