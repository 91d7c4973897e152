import { useCurrentUser } from '../../app/current-user.tsx'
import { Page, PageBody, PageHead, Section } from '../../app/Page.tsx'
import { ThemeChoice, UnitChoice } from '../../app/PreferenceChoices.tsx'
import { OwnSessions } from './OwnSessions.tsx'
import { PasswordForm } from './PasswordForm.tsx'

export default function AccountPage() {
  const me = useCurrentUser()
  return (
    <Page>
      <PageHead
        title={me.name}
        label="Account"
        cells={[
          { label: 'Role', value: me.role },
          { label: 'Email', value: <span className="break-all">{me.email}</span> },
        ]}
      />
      <PageBody narrow>
        <Section title="On this device">
          <div className="flex flex-wrap gap-6">
            <UnitChoice />
            <ThemeChoice />
          </div>
        </Section>
        <Section title="Where you are signed in">
          <OwnSessions />
        </Section>
        <Section title="Password">
          <PasswordForm />
        </Section>
      </PageBody>
    </Page>
  )
}
