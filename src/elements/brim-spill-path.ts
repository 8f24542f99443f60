import { BrimSpillPath } from './brim-spill-path.component.ts';
import { define } from './define.ts';

define('brim-spill-path', BrimSpillPath);

export { BrimSpillPath };
