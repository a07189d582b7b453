import { Outlet } from 'react-router-dom'
import { VersionPlate } from '../components/version-plate'
import { GuestFrame } from '../features/people/components/guest-frame'
import { HereProvider } from '../features/people/components/here-provider'
import { SignedInFrame } from '../features/people/components/signed-in-frame'
import { weekday } from '../lib/dates'

/** Screens with navigation round them. */
export function SignedIn() {
  return (
    <HereProvider
      guestScreens={
        <GuestFrame>
          <Outlet />
        </GuestFrame>
      }
    >
      <SignedInFrame day={weekday(new Date())}>
        <VersionPlate />
        <Outlet />
      </SignedInFrame>
    </HereProvider>
  )
}

/** Screens that fill the device themselves: the run and the witness's view. */
export function SignedInBare() {
  return (
    <HereProvider staysWhenSignedOut>
      <Outlet />
    </HereProvider>
  )
}
