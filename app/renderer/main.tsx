import './styles/window.css';
import { connect } from './host/connection';
import { mountWindow } from './mount';

const place = document.getElementById('window');
if (place === null) throw new Error('The page has no place for the window.');
mountWindow(place, connect());
