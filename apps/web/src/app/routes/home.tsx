import { redirect } from 'react-router-dom';
import { paths } from '../paths.js';

export const loader = () => redirect(paths.projects());

export const Component = () => null;
