import { useState } from 'react';
import { Choice } from '#web/components/choice.tsx';
import { applyTheme, readTheme, themes, themeWords, type Theme } from '#web/lib/theme.ts';

export function ThemeChoice() {
  const [theme, setTheme] = useState(readTheme);
  const choose = (next: Theme): void => {
    applyTheme(next);
    setTheme(next);
  };
  return <Choice legend="Theme" inline value={theme} onChange={choose} options={themes.map((value) => ({ value, label: themeWords[value] }))} />;
}
