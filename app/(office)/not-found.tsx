export { default, metadata } from '../not-found';
