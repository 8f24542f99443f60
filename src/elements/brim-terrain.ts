import { BrimTerrain } from './brim-terrain.component.ts';
import { define } from './define.ts';

define('brim-terrain', BrimTerrain);

export { BrimTerrain };
