import { redirect, type LoaderFunctionArgs } from 'react-router-dom';
import { paths } from '../../paths.js';

export const loader = ({ params }: LoaderFunctionArgs) => redirect(paths.recordings(params.projectId ?? ''));

export const Component = () => null;
