export { buildProgram as setup } from './built-program';
