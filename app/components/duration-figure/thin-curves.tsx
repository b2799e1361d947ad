'use client';
import { useEffect, useRef } from 'react';
import { THEME_EVENT } from '../theme.ts';
import styles from './duration-figure.module.css';
import type { PixelCurve } from './nearest-curve';

interface Props {
  curves: readonly PixelCurve[];
  xs: readonly number[];
  near: string | null;
  width: number;
  height: number;
}

/** The curves beyond the labelled ones, on canvas: two thousand of them must not slow the pointer down. */
export function ThinCurves({ curves, xs, near, width, height }: Props) {
  const canvas = useRef<HTMLCanvasElement>(null);
  useEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (!element || !context) return;
    const scheme = window.matchMedia('(prefers-color-scheme: dark)');
    const draw = () => {
      const scale = window.devicePixelRatio || 1;
      element.width = Math.round(width * scale);
      element.height = Math.round(height * scale);
      context.setTransform(scale, 0, 0, scale, 0, 0);
      context.lineJoin = 'round';
      const thin = getComputedStyle(element).color;
      const strong = getComputedStyle(element).outlineColor;
      for (const curve of curves) {
        const picked = curve.code === near;
        context.strokeStyle = picked ? strong : thin;
        context.lineWidth = picked ? 2 : 0.8;
        trace(context, curve, xs);
      }
    };
    draw();
    scheme.addEventListener('change', draw);
    window.addEventListener(THEME_EVENT, draw);
    return () => {
      scheme.removeEventListener('change', draw);
      window.removeEventListener(THEME_EVENT, draw);
    };
  }, [curves, xs, near, width, height]);
  return <canvas ref={canvas} className={styles.thin} style={{ width, height }} />;
}

function trace(context: CanvasRenderingContext2D, curve: PixelCurve, xs: readonly number[]): void {
  let drawing = false;
  context.beginPath();
  curve.y.forEach((y, index) => {
    if (y === null) drawing = false;
    else if (drawing) context.lineTo(xs[index], y);
    else {
      context.moveTo(xs[index], y);
      drawing = true;
    }
  });
  context.stroke();
}
