export { NothingHere as default } from '../nothing-here';
