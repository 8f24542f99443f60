import { BrimPourPoints } from './brim-pour-points.component.ts';
import { define } from './define.ts';

define('brim-pour-points', BrimPourPoints);

export { BrimPourPoints };
