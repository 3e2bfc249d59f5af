/**
 * The schema library, told not to compile its checks with `new Function`: the content security policy forbids
 * eval, and the library would try it once on load. Every schema in the project imports `z` from here.
 */
import { z } from 'zod';

z.config({ jitless: true });

export { z };
