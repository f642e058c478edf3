declare module 'asciichart' {
  interface PlotSettings {
    readonly min?: number;
    readonly max?: number;
    readonly offset?: number;
    readonly height?: number;
    readonly symbols?: readonly string[];
    readonly format?: (value: number, row: number) => string;
  }
  const asciichart: { plot(series: readonly number[], settings?: PlotSettings): string };
  export default asciichart;
}
