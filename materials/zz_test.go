package materials
import ("testing";"fmt";"math")
func TestZ(t *testing.T){
 p:=func(name string, m Medium, x float64){ n,err:=Index(m,x); g,_:=GroupIndex(m,x); fmt.Printf("%s %.5g um n=%.7f N=%.6f %v\n",name,x*1e6,n,g,err)}
 s:=FusedSilica()
 for _,x:=range []float64{.213856,.248,.3650,.4047,.4358,.4861,.5461,.5876,.589262,.5893,.6328,.6563,1.01398,1.064,1.31,1.52952,1.55}{p("silica",s,x*1e-6)}
 for _,x:=range []float64{.4047,.4861,.5893,.6563}{p("water",Water(),x*1e-6)}
 p("air",Air(),.5893e-6)
 for _,x:=range []float64{.5876,.5893,.633,.65}{p("pmma",PMMA(),x*1e-6);p("pmmaosc",PMMAByOscillator(),x*1e-6);p("pc",Polycarbonate(),x*1e-6)}
 p("zblan",FluorideGlass(),.5893e-6); p("geo2",Germania(),.5893e-6); p("geo2",Germania(),.5876e-6)
 for _,x:=range []float64{.6,1,2,3,4,5,8,10,10.6}{p("as2s3",ArsenicTrisulfide(),x*1e-6)}
 // Ghosh vs Malitson at 20
 g,_:=SilicaAt(Celsius(20)); worst:=0.0
 for i:=0;i<=1000;i++{ x:=.23e-6*math.Pow(3.37/.23,float64(i)/1000); x=math.Min(x,3.37e-6); a,_:=Index(g,x);b,_:=Index(s,x); d:=a-b; if math.Abs(d)>math.Abs(worst){worst=d;fmt.Println("ghosh",x,d)}}
 for _,tc:=range []float64{0,10,20,30}{p(fmt.Sprint("water ",tc),Warmed{Water(),WaterThermoOptic(),Celsius(20),Celsius(tc)},.5893e-6)}
 for _,f:=range []float64{.01,.035,.05,.1,.135}{a,_:=GermaniaSilica(f);b,_:=GermaniaSilicaBySunak(f);p(fmt.Sprint("flem ",f),a,1.55e-6);p(fmt.Sprint("sunak ",f),b,1.55e-6)}
 f,_:=FluorineSilica(.01);p("F",f,1.55e-6)
 e,_:=Lookup("germania-silica"); fmt.Println(e.FractionForDelta(.0036,1.55e-6))
 c0,_:=FluorineSilica(0);p("sunak0",c0,1.55e-6)
 for _,n:=range []string{"germania-silica","germania-silica-by-sunak","fluorine-silica"}{
  e,_:=Lookup(n); bad:=0
  for i:=0;i<=60;i++{x:=e.Wavelengths.From*math.Pow(e.Wavelengths.To/e.Wavelengths.From,float64(i)/60); x=math.Min(x,e.Wavelengths.To)
   prev:=0.0; dir:=0.0
   for j:=0;j<=400;j++{g,_:=e.Glass(e.Fractions.To*float64(j)/400); v,err:=Index(g,x); if err!=nil{fmt.Println(err)}; if j>1&&(v-prev)*dir<=0{bad++;if bad<5{fmt.Println("NONMONO",n,x,j)}}; if j>0{dir=v-prev}; prev=v}}
  fmt.Println(n,bad)}
}
