/** The one time library of the core, named in one place. */
export { Temporal } from 'temporal-polyfill';
