import { BrimHost } from './brim-host.component.ts';
import { define } from './define.ts';

define('brim-host', BrimHost);

export { BrimHost };
