'use client';
import { useEffect, useState } from 'react';

const KEY = 'hungerstone.who';

/** The name under which the reader marks days and imports files: kept in the browser, asked for once.
 *  @returns the name, and how to change it */
export function useWho(): [string, (name: string) => void] {
  const [who, setWho] = useState('');
  useEffect(() => {
    try {
      setWho(localStorage.getItem(KEY) ?? '');
    } catch {
      // storage may be refused (private windows): the name is asked for anew
    }
  }, []);
  const keep = (name: string) => {
    setWho(name);
    try {
      localStorage.setItem(KEY, name);
    } catch {
      // it lasts for the page all the same
    }
  };
  return [who, keep];
}
