import { describe, expect, it } from 'vitest';
import { latexText } from '../../../app/report/latex-text';

describe('latexText', () => {
  it('lets no character act as a command', () => {
    expect(latexText('50% \\input{x} a_b $5 & #1 ~^')).toBe(
      '50\\% \\textbackslash{}input\\{x\\} a\\_b \\$5 \\& \\#1 \\textasciitilde{}\\textasciicircum{}',
    );
  });

  it('writes what the standard fonts lack', () => {
    expect(latexText('HeH⁺, H₂ at 0.74 Å – −1 ⟨S²⟩ ωₑ')).toBe(
      'HeH\\textsuperscript{$+$}, H\\textsubscript{2} at 0.74 \\AA{} -- $-$1 $\\langle$S\\textsuperscript{2}$\\rangle$ $\\omega$\\textsubscript{e}',
    );
  });

  it('joins raised characters, sets a macron over its letter, and names what no font has', () => {
    expect(latexText('cm⁻¹ D̄ₑ ✂')).toBe('cm\\textsuperscript{$-$1} $\\bar{D}$\\textsubscript{e} (U+2702)');
  });

  it('keeps a paragraph in one line', () => {
    expect(latexText('a\n\n b')).toBe('a b');
  });
});
