import { LineChart, ScatterChart } from 'echarts/charts';
import { GridComponent, MarkAreaComponent, MarkLineComponent, TooltipComponent } from 'echarts/components';
import { init, use, type EChartsType } from 'echarts/core';
import { SVGRenderer } from 'echarts/renderers';
import { traceOption, type TracePicture } from './trace-option';

use([
  GridComponent,
  LineChart,
  MarkAreaComponent,
  MarkLineComponent,
  ScatterChart,
  SVGRenderer,
  TooltipComponent,
]);

/** The chart in a lazy chunk of its own: nothing else imports the library. */
export class TraceChart {
  private readonly chart: EChartsType;

  constructor(host: HTMLElement) {
    this.chart = init(host, null, { renderer: 'svg' });
  }

  draw(picture: TracePicture): void {
    this.chart.resize({ width: picture.width });
    this.chart.setOption(traceOption(picture), { notMerge: true });
  }

  /**
   * Calls back with the instant under the pointer, or null when it leaves. The library's own tooltip is written with
   * inline styles, which the content security policy forbids, so the page shows its own.
   */
  onPoint(tell: (atMs: number | null) => void): void {
    const surface = this.chart.getZr();
    surface.on('mousemove', ({ offsetX, offsetY }) => {
      const inside = this.chart.containPixel({ gridIndex: 0 }, [offsetX, offsetY]);
      const at = inside ? this.chart.convertFromPixel({ xAxisIndex: 0 }, offsetX) : null;
      tell(typeof at === 'number' ? at : null);
    });
    surface.on('globalout', () => tell(null));
  }

  dispose(): void {
    this.chart.dispose();
  }
}
