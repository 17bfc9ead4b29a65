package lang
import ("testing";"os";"strconv")
func TestSeedRun(t *testing.T){ a,_:=strconv.ParseUint(os.Getenv("A"),10,64); for s:=a;s<a+150000;s++{ checkLayout(t,random(s)) } }
