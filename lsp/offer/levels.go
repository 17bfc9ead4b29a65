package offer

import (
	"kern/checker"
	"kern/checker/model"
	"kern/lang"
)

// maxLevels bounds how many pairs of levels are offered.
const maxLevels = 3

// levels offers to say a height by the levels that it lies between: those whose
// difference is the very same number in every calculation that reads the file.
func (l *list) levels(s site) {
	o, ok := l.memberOf(s)
	if !ok || s.stmt.Word != "height" || len(s.Stmts) != 2 {
		return
	}
	value, ok := s.stmt.Assigned()
	all := l.results(o)
	if !ok || len(value) != 1 || len(all) == 0 || len(all[0].Missing) > 0 || s.stmt.Body != nil {
		return
	}
	height := all[0].Member.Height
	offered := 0
	for _, from := range l.levelsOf() {
		for _, to := range l.levelsOf() {
			if offered == maxLevels || !l.between(from.Name, to.Name, height) {
				continue
			}
			offered++
			text := "from " + from.Name + " to " + to.Name
			l.add(Offer{Kind: Rewrite, Title: "Stand between levels: " + text, edits: func() []checker.Edit {
				return []checker.Edit{l.edit(s.Start, s.stmt.Line, text)}
			}})
		}
	}
}

func (l *list) levelsOf() []*model.Level {
	if len(l.calculations) == 0 {
		return nil
	}
	return l.calculations[0].Env.Levels
}

// between tells whether two levels lie a height apart wherever the file is read.
func (l *list) between(from, to string, height float64) bool {
	level := func(env *model.Env, name string) *model.Level {
		n := env.Names[name]
		if n == nil || n.Kind != model.LevelName || n.Index < 0 || n.Twice || env.Levels[n.Index].Bad {
			return nil
		}
		return env.Levels[n.Index]
	}
	for _, c := range l.calculations {
		a, b := level(c.Env, from), level(c.Env, to)
		if a == nil || b == nil || b.At-a.At != height {
			return false
		}
	}
	return len(l.calculations) > 0 && !lang.Joins(from) && !lang.Joins(to)
}
