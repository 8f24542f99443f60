import { BrimLegend } from './brim-legend.component.ts';
import { define } from './define.ts';

define('brim-legend', BrimLegend);

export { BrimLegend };
