package session

// inMemory is how many steps to undo, and to redo, keep their asset in memory.
// Older ones have it in the register's history, so that a long day's work
// takes no more memory than a short one's.
const inMemory = 50

// keepStep adds a step to a list of them.
func keepStep(list []step, s step) []step {
	list = append(list, s)
	if old := len(list) - 1 - inMemory; old >= 0 {
		list[old].asset = nil
	}
	return list
}
