package session

import "anodewright/storage"

// Backups returns the register's dated backups, the newest first.
func (s *Session) Backups() ([]storage.Backup, error) { return s.store.Backups() }

// BackupDaily makes a backup when the last one is a day old.
func (s *Session) BackupDaily() error { return s.store.BackupDaily() }

// RestoreBackup brings the whole register back to a backup and shows it. The
// present state is backed up first; it returns that backup.
func (s *Session) RestoreBackup(path string) (storage.Backup, error) {
	s.mu.Lock()
	made, err := s.store.RestoreBackup(path)
	if err == nil {
		s.clashes = map[string]*Clash{}
		err = s.loadFleet()
	}
	s.mu.Unlock()
	s.compute()
	s.changed()
	return made, err
}
