import { useEffect, useState } from 'react';

/** A value once it has stayed the same for a while, so that typing does not ask the server at each key. */
export function useSettled<Value>(value: Value, milliseconds = 250): Value {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), milliseconds);
    return () => clearTimeout(timer);
  }, [value, milliseconds]);
  return settled;
}
