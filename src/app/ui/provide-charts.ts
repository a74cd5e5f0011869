import type { Provider } from '@angular/core';
import { provideEchartsCore } from 'ngx-echarts';

/** For the `providers` of a component that shows a chart; fetches the chart library when the first one is drawn. */
export function provideCharts(): Provider {
  return provideEchartsCore({ echarts: async () => (await import('./charts')).echarts });
}
