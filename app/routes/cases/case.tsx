import { Outlet } from 'react-router';

export default function Placeholder() {
  return <Outlet />;
}
