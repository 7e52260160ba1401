package quantity
import ("testing";"fmt")
func TestQuick(t *testing.T){
 for _,s:=range []string{"100 kg","100 kg ± 5 kg","100 kg +/- 5 %","100 kg ± 0","86 .. 104 kg","86kg..104kg","310 lb","-5 lb", "1 800 kg","100"}{
  b,err:=Parse(Mass,s); fmt.Printf("%q %+v %v\n",s,b,err)
 }
 for _,s:=range []string{"6 ft","6 ft 4 1/2 in","4 1/2 in","1/2 in","6 ft ± 1 in", "6 ft 4 in .. 2 m"}{
  b,err:=Parse(Length,s); fmt.Println(s,b.Low,b.Value,b.High,b.Unit,err)
 }
 b,_:=Parse(Force,"1800 lbf"); fmt.Println(b.Value, b.Value==8006.7989074689, Format(b.Value,Force.SI(),5,Down), Format(b.Value, b.Unit, 4, Nearest))
 for _,u:=range Units(){fmt.Print(u.Symbol,"=",u.Factor()," ")}
 fmt.Println(Of(Ratio,0.25),Sum(Of(Mass,0.1),Of(Mass,0.2)))
}
func BenchmarkParse(b *testing.B){ for _,s:=range []struct{d Dimension;t string}{{Mass,"100 kg ± 5 kg"},{Force,"1800 lbf"},{Length,"6 ft 4 1/2 in"},{Angle,"30 deg"}}{ b.Run(s.t,func(b *testing.B){b.ReportAllocs();for b.Loop(){Parse(s.d,s.t)}})}}
func BenchmarkFormat(b *testing.B){ u:=Force.SI(); b.ReportAllocs(); for b.Loop(){Format(8006.7989,u,5,Down)}}
