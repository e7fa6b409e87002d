import { Link } from 'react-router-dom';
import { ThemeChoice } from './theme-choice.tsx';

export function Foot() {
  return (
    <footer className="foot">
      <div className="wrap">
        <p>Evenbeam is an open registry of gate quality. Figures hold for the qubits, gates and dates stated with them. They do not replace acceptance testing under a contract.</p>
        <div className="footside">
          <ul>
            <li><Link to="/method">Method M1</Link></li>
            <li><Link to="/schema">Schema</Link></li>
            <li><Link to="/log">Log</Link></li>
          </ul>
          <ThemeChoice />
        </div>
      </div>
    </footer>
  );
}
